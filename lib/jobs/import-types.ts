import type { FlowUnit, ImportReport, Inspection, IntakeError, Mapping } from '../intake/types.ts';

export const FILE_KINDS = ['registry', 'layer', 'flows'] as const;
export type FileKind = (typeof FILE_KINDS)[number];

/** What a person says about one file beyond what can be recognised in it. */
export interface FileChoices {
  /** what the file is; recognised by content where nobody says */
  kind?: FileKind;
  mapping?: Partial<Mapping>;
  unit?: FlowUnit;
  /** code of the station of a file that names none */
  station?: string;
}

/** What a person says about a whole import. */
export interface ImportChoices {
  /** for every flow file that has no choice of its own */
  all?: FileChoices;
  /** by file name */
  files?: Record<string, FileChoices>;
  /** take new values where they are unlike those that stand; otherwise such a file is refused */
  revise?: boolean;
  /** who imports, as shown in the list of imports */
  by?: string;
}

/** A file on this machine with the name that the person knows it by. */
export interface GivenFile {
  path: string;
  name: string;
  /** what it is, where that is known beforehand; else recognised by content */
  kind?: FileKind;
}

/** Where an import stands; what the event stream of a job carries. */
export interface ImportProgress {
  stage: 'waiting' | 'recognising' | 'reading' | 'storing' | 'done';
  /** the file being read, and which of how many */
  file: string | null;
  fileNumber: number;
  files: number;
  rows: number;
  bytes: number;
  totalBytes: number;
  /** 0 to 1 over all files: reading is nine tenths, storing the last one */
  share: number;
  rowsPerSecond: number;
}

/** Why a file was not taken; all files are then left out, and the database is as it was. */
export interface ImportProblem {
  file: string;
  message: string;
  /** row, value, remedy and what is needed, where the file was understood that far */
  problem: IntakeError['problem'] | null;
  /** what the file looks like, where an answer is needed */
  inspection: Omit<Inspection, 'problems'> | null;
}

/** One file that was taken in, in the order of the import. */
export interface TakenFile {
  /** number of the import, by which it can be undone */
  importId: number;
  file: string;
  kind: FileKind;
  /** in a few words: "12 stations, 3 of them new" */
  summary: string;
  /** for flows: counts, rejected rows, gaps; null for registries and layers */
  report: ImportReport | null;
  warnings: string[];
}

/** What came of an import job: files taken, or the problems of a job that failed. */
export interface ImportOutcome {
  taken: TakenFile[];
  problems: ImportProblem[];
}
