import { readHead } from '../intake/file-blocks.ts';
import { inspectFile } from '../intake/inspect-file.ts';
import { readLayer } from '../intake/read-layer.ts';
import { readRegistry } from '../intake/read-registry.ts';
import { decodeText } from '../intake/text-encoding.ts';
import { type Inspection, IntakeError, type KnownStation } from '../intake/types.ts';
import type { FileChoices, FileKind, GivenFile } from './import-types.ts';
import { flowOptions, kindOf } from './stage-file.ts';
import type { FilePreview, LayerPreview, PreviewProblem, RegistryPreview } from './upload-types.ts';

/** Stations of a registry that are shown, and lines of a text. */
const SHOWN_STATIONS = 50;
const SHOWN_LINES = 12;
const LONGEST_LINE_SHOWN = 2_000;

export interface FileLook {
  file: GivenFile;
  /** bytes */
  size: number;
  choices: FileChoices;
  /** where the region lies: west, south, east, north; null where nobody knows */
  near: [number, number, number, number] | null;
  /** the stations that flows may name; null where flows make them */
  known: KnownStation[] | null;
  /** why it cannot be taken, where that is known beforehand */
  broken?: PreviewProblem;
}

/** What a look tells, and of a registry the stations that flows may name from now on. */
export interface Looked {
  preview: FilePreview;
  names: KnownStation[] | null;
}

const brokenPreview = (file: string, size: number, choices: FileChoices, problem: PreviewProblem): FilePreview => ({
  ...{ file, size, choices, problems: [problem], problem: problem.message, state: 'unreadable' as const, kind: null },
  ...{ layout: null, unit: null, stations: [], count: null, needs: [], likeness: null },
  ...{ inspection: null, registry: null, layer: null, lines: [] },
});

type Found = Pick<FilePreview, 'problems'> &
  Partial<Pick<FilePreview, 'inspection' | 'registry' | 'layer' | 'count'>> & { names?: KnownStation[] };

/** Looks at a file's beginning under the choices made for it; a registry or layer is read whole.
 *  Changes nothing; whatever is wrong with the file or the choices stands in `problems`. */
export async function lookAtFile({ file, size, choices, near, known, broken }: FileLook): Promise<Looked> {
  if (broken) return { preview: brokenPreview(file.name, size, choices, broken), names: null };
  const kind = await kindOf(file, { files: { [file.name]: choices } });
  const found = await foundIn(kind, { file, choices, near, known }).catch((error: unknown): Found => {
    if (!(error instanceof IntakeError)) throw error;
    return { problems: [problemIn(error)] };
  });
  const { problems, inspection = null, registry = null, layer = null, count = null, names = null } = found;
  const mapping = inspection?.mapping ?? null;
  const needs = problems.flatMap(({ problem }) => problem.needs ?? []);
  const preview: FilePreview = {
    ...{ file: file.name, size, kind, choices, problems, inspection, registry, layer, count, needs },
    state: problems.length === 0 ? 'ready' : problems.every(({ problem }) => problem.needs) ? 'asks' : 'unreadable',
    layout: mapping?.layout ?? null,
    unit: mapping?.unit ?? null,
    stations: [...new Set((inspection?.understood ?? []).map(({ station }) => station).filter(Boolean))].slice(0, 20),
    problem: problems[0]?.message ?? null,
    likeness: likenessOf(kind, inspection),
    lines: kind === 'flows' && inspection?.sheets === null ? await firstLines(file) : [],
  };
  return { preview, names };
}

async function foundIn(
  kind: FileKind,
  { file, choices, near, known }: Pick<FileLook, 'file' | 'choices' | 'near' | 'known'>,
): Promise<Found> {
  if (kind === 'registry') return registryIn(file, choices, near);
  if (kind === 'layer') {
    const { name, kind: shape, features, bounds, warnings } = await readLayer(file.path, file.name);
    const layer: LayerPreview = { name, kind: shape, features, bounds, warnings };
    return { problems: [], layer, count: features };
  }
  const options = flowOptions({ file, choices: { files: { [file.name]: choices } }, registry: known });
  const { problems, ...inspection } = await inspectFile(file.path, options);
  return { problems: problems.map(problemIn), inspection };
}

async function registryIn(file: GivenFile, choices: FileChoices, near: FileLook['near']): Promise<Found> {
  try {
    const { stations, given, warnings } = await readRegistry(file.path, file.name, {
      corrections: choices.corrections,
      areaUnit: choices.areaUnit,
      near,
      sheet: choices.mapping?.sheet,
    });
    const shown = stations.slice(0, SHOWN_STATIONS);
    const registry: RegistryPreview = { stations: shown, total: stations.length, given, warnings, offered: [] };
    const names = stations.map(({ code, name }) => ({ code, name }));
    return { problems: [], registry, count: stations.length, names };
  } catch (error) {
    if (!(error instanceof IntakeError) || error.problem.needs !== 'correction') throw error;
    const offered = error.problem.corrections ?? [];
    const registry: RegistryPreview = { stations: [], total: 0, given: [], warnings: [], offered };
    return { problems: [problemIn(error)], registry };
  }
}

const problemIn = (error: IntakeError): PreviewProblem => ({ message: error.message, problem: error.problem });

type Look = Pick<Inspection, 'mapping' | 'header' | 'preview' | 'others'>;

/** Files of one layout with one header are laid out alike. A wide file's header names its stations, which differ: there
 *  the columns of the date count. Documents are alike when they hold the same series beside the one that is read. */
function likenessOf(kind: FileKind, inspection: Look | null): string | null {
  const mapping = inspection?.mapping;
  if (kind !== 'flows' || !mapping) return null;
  const { layout, delimiter = null, date } = mapping;
  const { header, preview, others } = inspection;
  const series = layout.startsWith('waterml') ? others.map(({ label }) => label).sort() : [];
  const nameOf = (column: unknown) => (typeof column === 'number' ? (header?.[column] ?? column) : column);
  const columns = layout === 'wide' ? date.columns.map(nameOf) : (header ?? preview[0]?.length ?? 0);
  return JSON.stringify([layout, delimiter, columns, series]);
}

async function firstLines(file: GivenFile): Promise<string[]> {
  const { bytes } = await readHead(file.path, file.name);
  return decodeText(bytes.subarray(0, 64 * 1024))
    .split(/\r\n|\n|\r/, SHOWN_LINES)
    .map((line) => line.slice(0, LONGEST_LINE_SHOWN));
}
