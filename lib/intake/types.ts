import type { DayCode } from '../series/day-codes.ts';
import { FLOW_UNITS, type FlowUnit } from '../series/flow-units.ts';
import type { Quantity, Unit } from '../series/quantities.ts';
import type { RejectedRow } from './intake-error.ts';
import type { Layout, Mapping } from './mapping-types.ts';

export * from './inspection-types.ts';
export * from './intake-error.ts';
export * from './mapping-types.ts';
export * from './registry-types.ts';
export { FLOW_UNITS, type FlowUnit, type Quantity, type Unit };

/** What a file of flows says of a station beside its days. Facts fill in what nobody has said yet; they never replace. */
export interface FoundFacts {
  code: string;
  name?: string;
  river?: string;
  latitude?: number;
  longitude?: number;
  areaKm2?: number;
}

/** Facts as the lines above a table state them: without a code they are of the file's one station. */
export type StatedFacts = Omit<FoundFacts, 'code'> & { code?: string };

/** Counts of one station in one file, values as imported (in the file's unit). */
export interface StationReport {
  code: string;
  /** absent: flow */
  quantity?: Quantity;
  values: number;
  missing: number;
  /** ISO dates of the first and last row with a value; null when there is none */
  first: string | null;
  last: string | null;
  zeros: number;
  min: number | null;
  max: number | null;
  /** stretches of days between first and last value without a value, and the longest of them in days */
  gaps: number;
  longestGapDays: number;
  duplicates: number;
}

/** What became of one file. Every reader ends in one. */
export interface ImportReport {
  file: string;
  layout: Layout;
  unit: Unit;
  mapping: Mapping;
  rows: number;
  accepted: number;
  rejectedTotal: number;
  /** where all rejected rows can be had as CSV; null when there are none */
  rejectedFile: string | null;
  /** at most 1,000 */
  rejected: RejectedRow[];
  stations: StationReport[];
  sha256: string;
  warnings: string[];
  /** stations' facts that the file states; absent when it states none */
  facts?: FoundFacts[];
}

/** One station's values of one file: consecutive days from `firstDay`, as written. */
export interface StagedPart {
  code: string;
  /** absent: flow */
  quantity?: Quantity;
  unit: Unit;
  firstDay: number;
  /** in `unit`, NaN = missing */
  values: Float64Array;
  /** index into `codeList` a day; NO_ROW where the file has no row for the day */
  codes: Uint8Array;
  codeList: DayCode[];
}

/** A station that flows may name. */
export interface KnownStation {
  code: string;
  name: string;
}

export interface InspectOptions {
  /** the file's name as the person knows it; names the station where the file does not, and stands in messages */
  fileName: string;
  /** laid over what is recognised, key by key */
  mapping?: Partial<Mapping>;
  /** unit of the values, before what the file itself says */
  unit?: Unit;
  /** code of the one station of a file that names none */
  station?: string;
  /** the region's registry: a station outside it refuses the file; null or absent: stations are made from the flows */
  knownStations?: KnownStation[] | null;
  /** codes that differ from the registry's by case or leading zeros only are taken for the registry's */
  matchCodes?: boolean;
}

export interface ReadFlowsOptions extends InspectOptions {
  /** after every block of about a megabyte */
  onProgress?(rows: number, bytes: number, totalBytes: number): void;
  /** every rejected row, also those beyond the 1,000 that the report holds */
  onRejected?(row: RejectedRow): void;
  signal?: AbortSignal;
  /** path of a file that days go to for which there is no room in memory; it is gone afterwards. By default among the
   *  system's temporary files */
  scratch?: string;
  /** the last day that is not in the future, as a day number; by the clock where it is not given */
  today?: number;
  /** one part a station, in order of appearance, and only when the whole file has been found good; of a file with
   *  several quantities, when all rows of the quantity have */
  emit(part: StagedPart): void;
}
