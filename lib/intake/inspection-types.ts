import type { Quantity, Unit } from '../series/quantities.ts';
import type { IntakeError } from './intake-error.ts';
import type { FieldPlace, Mapping } from './mapping-types.ts';
import type { FoundFacts } from './types.ts';

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
