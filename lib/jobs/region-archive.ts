import { readFile, stat } from 'node:fs/promises';
import type * as z from 'zod';
import { lastPart } from '../intake/archive/kinds.ts';
import { parseMapping } from '../intake/mapping.ts';
import { IntakeError } from '../intake/types.ts';
import { ARCHIVE_FORMAT, ARCHIVE_VERSION, type ArchivedRegion } from '../store/archived-region.ts';
import { importsDocumentSchema, regionDocumentSchema } from './archived-region-schema.ts';
import type { FileChoices, GivenFile } from './import-types.ts';

const REGION = 'region.json';
const IMPORTS = 'imports.json';
const STATIONS = 'stations.geojson';
/** The two documents are held in memory whole. */
const MOST_BYTES = 64e6;

/** What to import of a region's archive, and how. */
export interface OpenedArchive {
  files: GivenFile[];
  /** by file name */
  choices: Record<string, FileChoices>;
  /** as the region was called */
  name: string;
  region: ArchivedRegion;
}

/** Looks whether the files given are those of a region's archive, and says how to import them so that the region comes out
 *  as it was: its stations, its layers, and the days of each import in their order, under their own rules.
 *  @returns null when they are not
 *  @throws IntakeError for an archive that is damaged, or of a newer program */
export async function openRegionArchive(files: readonly GivenFile[]): Promise<OpenedArchive | null> {
  const named = new Map(files.map((file) => [lastPart(file.name), file]));
  const about = named.get(REGION);
  const region = about && (await jsonOf(about));
  if (!about || !isRegionDocument(region)) return null;
  if (typeof region.version === 'number' && region.version > ARCHIVE_VERSION) {
    throw new IntakeError({
      ...{ file: about.name, value: String(region.version) },
      ...{ message: 'a newer program wrote this archive', remedy: 'Import it with that version, or a later one' },
    });
  }
  const need = (name: string): GivenFile => {
    const file = named.get(lastPart(name));
    if (file) return file;
    const remedy = 'Import the archive as it was exported, with all of its files';
    throw new IntakeError({
      file: about.name,
      value: name,
      message: 'the archive names a file that is not there',
      remedy,
    });
  };
  const document = checked(regionDocumentSchema, region, about);
  const list = need(IMPORTS);
  const imports = checked(importsDocumentSchema, await jsonOf(list), list);
  const opened: OpenedArchive = { files: [], choices: {}, name: document.name, region: document };
  const add = (file: GivenFile, choices: FileChoices) => {
    opened.files.push(file);
    opened.choices[file.name] = choices;
  };
  add(need(STATIONS), { kind: 'registry' });
  for (const { file, name, kind } of document.layers) add(need(file), { kind: 'layer', layer: { name, kind } });
  for (const entry of imports) {
    if (entry.file === null) continue;
    add(need(entry.file), { kind: 'flows', mapping: parseMapping(entry.read, list.name), recorded: entry });
  }
  return opened;
}

function isRegionDocument(json: unknown): json is Record<string, unknown> {
  return typeof json === 'object' && json !== null && (json as { format?: unknown }).format === ARCHIVE_FORMAT;
}

/** The file's JSON; null when it is none. */
async function jsonOf({ path, name }: GivenFile): Promise<unknown> {
  if ((await stat(path)).size > MOST_BYTES) {
    const message = `the file is larger than ${MOST_BYTES / 1e6} MB`;
    throw new IntakeError({ file: name, message, remedy: 'Check that it is the right file' });
  }
  try {
    return JSON.parse(await readFile(path, 'utf8'));
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}

function checked<Schema extends z.ZodType>(schema: Schema, json: unknown, { name }: GivenFile): z.infer<Schema> {
  const result = schema.safeParse(json);
  if (result.success) return result.data;
  const [issue] = result.error.issues;
  throw new IntakeError({
    ...{ file: name, value: issue.path.join('.') },
    ...{ message: `the archive is damaged: ${issue.message}`, remedy: 'Export the region again' },
  });
}
