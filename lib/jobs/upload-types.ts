import type {
  Correction,
  Inspection,
  IntakeError,
  Layout,
  Need,
  RegistryFact,
  RegistryStation,
  Unit,
} from '../intake/types.ts';
import type { JobState } from '../store/jobs.ts';
import type { FileChoices, FileKind } from './import-types.ts';

/** Where one file of an upload stands. unseen: not looked at yet · ready: as far as its beginning tells, it can be read ·
 *  asks: an answer is needed · unreadable: no answer would do */
export type UploadedState = 'unseen' | 'ready' | 'asks' | 'unreadable';

/** One file of an upload, in short. */
export interface UploadedFile {
  /** its name, unlike that of every other file of the upload */
  file: string;
  /** bytes */
  size: number;
  state: UploadedState;
  /** null while it has not been looked at */
  kind: FileKind | null;
  layout: Layout | null;
  unit: Unit | null;
  /** codes met in the first rows; of a registry or layer, how many stations or features it has */
  stations: string[];
  count: number | null;
  /** the first thing that stands against taking it, and what would answer it */
  problem: string | null;
  needs: Need[];
  /** equal for files that are laid out alike, so that one answer does for all of them; null where that cannot be told */
  likeness: string | null;
  /** what a person has said about it */
  choices: FileChoices;
}

/** A preview without what only the screen of the one file shows. */
export function inShort(preview: FilePreview): UploadedFile {
  const { problems, inspection, registry, layer, lines, ...short } = preview;
  return short;
}

/** Something that stands against taking a file. */
export interface PreviewProblem {
  message: string;
  problem: IntakeError['problem'];
}

/** One file of an upload as it is understood under the choices at hand. */
export interface FilePreview extends UploadedFile {
  problems: PreviewProblem[];
  /** of flows; null for the other kinds, and where a choice could not be read */
  inspection: Omit<Inspection, 'problems'> | null;
  /** the first lines as they stand in the file: positions of fixed-width columns are counted on them */
  lines: string[];
  registry: RegistryPreview | null;
  layer: LayerPreview | null;
}

export interface RegistryPreview {
  /** the first stations as understood; empty where it cannot be taken */
  stations: RegistryStation[];
  total: number;
  given: RegistryFact[];
  warnings: string[];
  /** corrections of the coordinates that would make it fit */
  offered: Correction[];
}

export interface LayerPreview {
  name: string;
  kind: string;
  features: number;
  /** west, south, east, north */
  bounds: [number, number, number, number];
  warnings: string[];
}

/** A region's archive among the files of an upload: it is imported whole, as it says itself. */
export interface ArchiveInShort {
  /** as the region was called */
  name: string;
  /** files of the archive that are read: the station list, layers, and the days of each import */
  stations: number;
  layers: number;
  flows: number;
  /** WaterML documents, which say the same days a second time: they are not read */
  documents: number;
  /** names of other files, which are no part of it: they are not read either */
  unread: string[];
}

/** An upload that waits on the server for its import. */
export interface UploadView {
  id: string;
  /** slug of the region that it is for; null: its import makes one */
  region: string | null;
  /** ISO date and time */
  createdAt: string;
  files: UploadedFile[];
  /** what was passed over in archives */
  notes: string[];
  archive: ArchiveInShort | null;
  /** names of files that are to stay out of the import */
  leaveOut: readonly string[];
  /** its last import, which may be under way, and the name of the region that it makes */
  job: { id: string; state: JobState; dryRun: boolean; name?: string } | null;
}
