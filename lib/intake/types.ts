import type { Influence } from '../region/ranking-types.ts';
import type { AreaUnit } from '../series/area-units.ts';
import type { FlagName } from '../series/daily-series.ts';
import { FLOW_UNITS, type FlowUnit } from '../series/flow-units.ts';
import type { Quantity, Unit } from '../series/quantities.ts';
import type { DerivedRecipe, NamedFlow, StationChange } from '../series/station-history.ts';

export { FLOW_UNITS, type FlowUnit, type Quantity, type Unit };

/** How the days lie in a file. `month-rows`: a row a month with a column for each day of it; `day-rows`: a row a day of the
 *  month with a column for each month, in blocks of a year. The last three are documents, whose places are not by column. */
export const LAYOUTS = [
  ...(['long', 'wide', 'agency-tab', 'whitespace', 'fixed-width', 'month-rows', 'day-rows'] as const),
  ...(['waterml-2', 'waterml-1', 'waterml-json'] as const),
] as const;
export type Layout = (typeof LAYOUTS)[number];

/** Where a field stands: a column of delimited text (position from 0, or header name), or characters of a line
 *  (from 0, end exclusive). */
export type FieldPlace = { column: number | string } | { slice: [number, number] };

/** How a file is to be read: as recognised, or as a person gave it by `--mapping` or on the screen. */
export interface Mapping {
  layout: Layout;
  station:
    | { from: 'file-name' }
    | { from: 'column'; column: number | string }
    | { from: 'given'; code: string }
    /** wide layouts: each column's heading names its station */
    | { from: 'header' }
    /** the lines above the table name it: "Station number: 0306" */
    | { from: 'lines-above' };
  /** columns in the order that `order` names; one column holds a whole date. Calendar layouts: the columns of year and
   *  month, in this order, or one that holds both (`month-rows`); those of year and day of the month (`day-rows`); only
   *  that of the month, or of the day, where `year` says the year */
  date: {
    columns: (number | string | [number, number])[];
    order: 'ymd' | 'dmy' | 'mdy';
    /** calendar layouts without a column of years: a line above each block names its year, or all rows are of this one */
    year?: number | 'heading';
    /** calendar layouts whose years begin in another month than January: that month, and whether the calendar year in
     *  which they begin or the one in which they end names them */
    yearBegins?: { month: number; named: 'first' | 'last' };
  };
  /** null in wide layouts, where every other column is a station. Calendar layouts: the first column of a day (of a month);
   *  the others follow it at equal steps, a flag behind each when there are flags */
  value: FieldPlace | null;
  /** calendar layouts: the flag of the first day (month) */
  flag: FieldPlace | null;
  unit: Unit | null;
  /** text that means "no value", beyond the usual ones */
  missing: string[];
  decimal: '.' | ',';
  /** sign between groups of three digits ("1,234.5"); absent: none */
  thousands?: ',' | '.' | ' ' | "'";
  /** two-digit years: the year that the first of the hundred they stand for is (1930: "29" is 2029, "30" is 1930) */
  firstYear?: number;
  /** several values a day: their mean is the day's, where at least this share (0 to 1) of the day is covered */
  dailyMean?: number;
  /** what the values are of; absent: flow */
  quantity?: Quantity;
  /** what flags mean in this file, by their text; goes before what their words say by themselves */
  flags?: Record<string, FlagName[]>;
  /** further quantities of the same file, each laid over this mapping in a reading of its own */
  also?: AlsoQuantity[];
  /** name of the sheet of a workbook */
  sheet?: string;
  /** delimited layouts only */
  delimiter?: string;
  /** only the rows whose column holds this text are flows; for files that mix several quantities */
  where?: { column: number | string; equals: string };
}

/** Where a file has another quantity than the mapping's own. */
export interface AlsoQuantity {
  quantity: Quantity;
  unit: Unit;
  value: FieldPlace | null;
  flag?: FieldPlace | null;
  where?: { column: number | string; equals: string };
}

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

/** A row that was not taken, with its place in the file. */
export interface RejectedRow {
  /** line number in the file, from 1 */
  row: number;
  text: string;
  reason: string;
}

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

/** What a person can answer so that a file can be read.
 *  century: which hundred years two-digit years stand for · daily-mean: whether several values a day become their mean ·
 *  codes: whether codes that differ by case or leading zeros are the registry's · correction: whether coordinates are
 *  swapped or run from 0 to 360 · quantity: which of several quantities is the flow · sheet: which sheet of a workbook */
export const NEEDS = [
  ...(['unit', 'station', 'date-order', 'mapping', 'area', 'revise', 'century', 'daily-mean', 'codes'] as const),
  ...(['correction', 'quantity', 'sheet', 'thousands'] as const),
] as const;
export type Need = (typeof NEEDS)[number];

/** Corrections of a registry's coordinates that a person may ask for; `none`: unlikely ones stand as they are. */
export const CORRECTIONS = ['swap-coordinates', 'longitude-360', 'none'] as const;
export type Correction = (typeof CORRECTIONS)[number];

/** A code as a file writes it, and that of the registry which it may be. */
export interface CodePair {
  written: string;
  registered: string;
}

/** A file that cannot be taken: names the file, the row where there is one, the value and the remedy. */
export class IntakeError extends Error {
  override name = 'IntakeError';
  constructor(
    readonly problem: {
      file: string;
      /** line number from 1 */
      row?: number;
      value?: string;
      /** what is wrong */
      message: string;
      /** what to do about it */
      remedy: string;
      /** machine-readable: the screen asks for what is missing */
      needs?: Need;
      /** with needs 'correction': what would put the rows right */
      corrections?: Correction[];
      /** with needs 'codes': the codes as written and those of the registry that they may be */
      pairs?: CodePair[];
      /** every row at fault, where several are (a registry is taken whole or not at all) */
      rows?: RejectedRow[];
    },
  ) {
    const place = problem.row === undefined ? problem.file : `${problem.file}, row ${problem.row}`;
    const value = problem.value === undefined ? '' : ` (“${problem.value}”)`;
    super(`${place}: ${problem.message}${value}. ${problem.remedy}`);
  }
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
  /** index into `codeList` a day; 255 = the file has no row for this day */
  codes: Uint8Array;
  codeList: DayCode[];
}

/** What a file says of a day beside its number. */
export interface DayCode {
  /** the flag as written; where the row has none, the text that stood in the value's place (`Ice`, `-99.0000`, `<`) */
  text: string;
  /** flag bits, see FLAG */
  bits: number;
  /** text in the value's place (`-999.00`, `Ice`), or before its number (`<`); absent when there was only a number
   *  or nothing */
  valueText?: string;
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

/** A column that may hold the flows, for a person to choose from. */
export interface ValueCandidate {
  place: FieldPlace;
  /** header name, or where it stands: "characters 29–38" */
  label: string;
  /** the first values in it, as written */
  samples: string[];
}

/** What a file looks like before it is read whole. */
export interface Inspection {
  /** as recognised; null where the file could not be understood at all (see problems) */
  mapping: Mapping | null;
  /** header names of a delimited file; null without a header row */
  header: string[] | null;
  /** the first rows split into fields */
  preview: string[][];
  /** line number of each row of `preview`, from 1, by which it meets its row of `understood`; absent for documents */
  previewLines?: number[];
  /** what must be answered, or put right, before the file can be read; empty when it can */
  problems: IntakeError[];
  valueCandidates: ValueCandidate[];
  /** the first rows as the program understands them, in the order of the file; empty until it can be read */
  understood: UnderstoodRow[];
  /** quantities beside the flow that the file holds, for a person to add */
  others: AlsoCandidate[];
  /** stations' facts that the file states */
  facts: FoundFacts[];
  /** the sheets of a workbook, in its order; null for other files */
  sheets: string[] | null;
}

/** One value as understood, or the reason why its row is not taken. */
export interface UnderstoodRow {
  /** line or row number in the file, from 1; of a document, the number of the point */
  row: number;
  station: string;
  /** ISO date; null where none can be read */
  date: string | null;
  /** null: missing */
  value: number | null;
  /** the flag as written */
  flag: string;
  /** bits of FLAG that it was understood as */
  bits: number;
  /** why the row is not taken; null when it is */
  problem: string | null;
}

/** A quantity of a file that is not read unless a person asks for it. */
export interface AlsoCandidate {
  label: string;
  samples: string[];
  /** null where it is not known what it is of, or in what unit */
  quantity: Quantity | null;
  unit: Unit | null;
  value: FieldPlace | null;
  flag: FieldPlace | null;
  where?: { column: number | string; equals: string };
}

/** One row of a station registry. */
export interface RegistryStation {
  code: string;
  name: string;
  river: string;
  latitude: number | null;
  longitude: number | null;
  areaKm2: number | null;
  influence: Influence;
  changes?: StationChange[];
  namedFlows?: NamedFlow[];
  notes?: string;
  derived?: DerivedRecipe | null;
}

export const REGISTRY_FACTS = [
  ...(['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'] as const),
  ...(['changes', 'namedFlows', 'notes', 'derived'] as const),
] as const;
export type RegistryFact = (typeof REGISTRY_FACTS)[number];

/** What a person says of a registry, and what is known beside it. */
export interface RegistryOptions {
  /** of its coordinates; without them a registry that seems to need one is refused */
  corrections?: readonly Correction[];
  /** name of the sheet of a workbook */
  sheet?: string;
  /** unit of areas that the file does not name */
  areaUnit?: AreaUnit;
  /** where the region lies by its layers and stations, as west, south, east, north: tells swapped coordinates */
  near?: readonly [number, number, number, number] | null;
}

/** A registry file, read whole. A registry with any bad row is refused with all of its bad rows named. */
export interface Registry {
  stations: RegistryStation[];
  rows: number;
  /** the facts that the file has columns for; what it does not speak of stays as it is */
  given: RegistryFact[];
  sha256: string;
  warnings: string[];
}

/** A map layer, checked: lines or polygons in longitude and latitude. */
export interface LayerFile {
  name: string;
  kind: 'river' | 'catchment' | 'other';
  /** a FeatureCollection as text */
  geojson: string;
  features: number;
  /** west, south, east, north */
  bounds: [number, number, number, number];
  sha256: string;
  warnings: string[];
}
