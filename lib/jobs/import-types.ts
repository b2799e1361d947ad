import type { Correction, ImportReport, Inspection, IntakeError, Mapping, Unit } from '../intake/types.ts';
import type { AreaUnit } from '../series/area-units.ts';
import type { ArchivedImport } from '../store/archived-region.ts';
import type { OverlapRule } from '../store/lay-parts.ts';
import type { LayerKind } from '../store/layer-kinds.ts';
import type { Revisions } from '../store/revisions.ts';

export const FILE_KINDS = ['registry', 'layer', 'flows'] as const;
export type FileKind = (typeof FILE_KINDS)[number];

/** What a person says about one file beyond what can be recognised in it. */
export interface FileChoices {
  /** what the file is; recognised by content where nobody says */
  kind?: FileKind;
  mapping?: Partial<Mapping>;
  unit?: Unit;
  /** code of the station of a file that names none */
  station?: string;
  /** take codes that differ by case or leading zeros for those of the registry */
  matchCodes?: boolean;
  /** of a registry's coordinates */
  corrections?: Correction[];
  /** of a registry whose areas are in a unit that it does not name */
  areaUnit?: AreaUnit;
  /** of a file of a region's archive: what its first import was */
  recorded?: ArchivedImport;
  /** of a layer of an archive */
  layer?: { name: string; kind: LayerKind };
}

/** What a person says about a whole import. */
export interface ImportChoices {
  /** for every flow file that has no choice of its own */
  all?: FileChoices;
  /** by file name */
  files?: Record<string, FileChoices>;
  /** take new values where they are unlike those that stand; short for rule 'take-new' */
  revise?: boolean;
  /** what becomes of days whose values are unlike those that stand; absent: such a file is refused, with its revisions */
  rule?: OverlapRule;
  /** read, check and compare, and change nothing: the outcome says what would come of it */
  dryRun?: boolean;
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
  stage: 'waiting' | 'recognising' | 'reading' | 'storing' | 'checking' | 'done';
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
  /** by what has gone so far; null while that tells too little */
  secondsLeft: number | null;
}

/** Why a file was not taken; all files are then left out, and the database is as it was. */
export interface ImportProblem {
  file: string;
  message: string;
  /** row, value, remedy and what is needed, where the file was understood that far */
  problem: IntakeError['problem'] | null;
  /** what the file looks like, where an answer is needed */
  inspection: Omit<Inspection, 'problems'> | null;
  /** where values are unlike those that stand */
  revisions?: Revisions;
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
  /** what it did to days that stood: null for registries and layers */
  revisions: Revisions | null;
}

/** What came of an import job: files taken, or the problems of a job that failed. */
export interface ImportOutcome {
  taken: TakenFile[];
  problems: ImportProblem[];
  /** what was passed over in archives; absent when nothing was */
  notes?: string[];
  /** a dry run: `taken` is what would be taken, with import ids of 0 */
  dryRun?: boolean;
  /** what the checks found on the records that the import touched: stations with findings, and findings. Absent where they
   *  were not checked; they are then at the next start or check */
  findings?: { stations: number; findings: number };
}
