import type { LayerKind } from '../../store/layers.ts';
import type { MarkKind } from '../../store/marks-on-flags.ts';

/** What region.json of an archive begins with. */
export const ARCHIVE_FORMAT = 'hungerstone-region';
export const ARCHIVE_VERSION = 1;

/** region.json: all of a region that is neither a station's fact, nor a layer, nor a day's flow. */
export interface ArchivedRegion {
  format: typeof ARCHIVE_FORMAT;
  version: number;
  program: string;
  name: string;
  /** made-up data */
  invented: boolean;
  /** the keys in which the region's own basis differs from the general defaults */
  basis: Record<string, unknown>;
  tiles: { url: string; attribution: string } | null;
  bases: { name: string; basis: Record<string, unknown> }[];
  mappings: { name: string; mapping: unknown }[];
  /** station codes, water flowing from the first to the second */
  links: { upstream: string; downstream: string; source: string }[];
  marks: ArchivedMark[];
  layers: { file: string; name: string; kind: LayerKind }[];
}

export interface ArchivedMark {
  station: string;
  quantity: string;
  /** ISO dates, both included */
  first: string;
  last: string;
  kind: MarkKind;
  reason: string;
  by: string;
  /** ISO date and time, UTC */
  createdAt: string;
}

/** One entry of imports.json, in the order in which the imports were laid over one another. */
export interface ArchivedImport {
  fileName: string;
  kind: 'flows' | 'registry' | 'layer';
  sha256: string;
  /** ISO date and time, UTC */
  createdAt: string;
  by: string;
  rule: string;
  layout: string;
  unit: string;
  rows: number;
  accepted: number;
  rejected: number;
  /** how its original file was read */
  mapping: unknown;
  /** flows: its days as a long table of the archive, and how to read that; null for other imports */
  file: string | null;
  read: unknown;
}
