import { parseMapping } from '../intake/mapping.ts';
import { readFlows } from '../intake/read-flows.ts';
import { readLayer } from '../intake/read-layer.ts';
import { readRegistry } from '../intake/read-registry.ts';
import type { ImportReport, InspectOptions, KnownStation } from '../intake/types.ts';
import type { ArchivedImport } from '../store/archived-region.ts';
import { timestamp } from '../store/connection.ts';
import type { Staging } from '../store/staging.ts';
import type { FileChoices, FileKind, GivenFile, ImportChoices } from './import-types.ts';
import { recogniseFile } from './recognise-kind.ts';
import { rejectedRowsFile } from './rejected-rows.ts';

/** A file that waits in the staging database, found good. */
export interface StagedFile {
  file: GivenFile;
  kind: FileKind;
  summary: string;
  rows: number;
  report: ImportReport | null;
  warnings: string[];
  /** of a registry: the stations that flows may name from now on */
  registry: KnownStation[] | null;
}

export interface StageTools {
  jobId: string;
  /** place among the files given, from 1 */
  fileNumber: number;
  choices: ImportChoices;
  registry: KnownStation[] | null;
  /** where the region lies: west, south, east, north; null where nobody knows */
  near: [number, number, number, number] | null;
  staging: Staging;
  signal: AbortSignal;
  onProgress: (rows: number, bytes: number) => void;
}

/** What a person chose for one file: its own choices before those for all. */
function choicesFor(file: GivenFile, choices: ImportChoices): FileChoices {
  return { ...choices.all, ...choices.files?.[file.name] };
}

/** What a file is: as a person says, else by what it holds. */
export async function kindOf(file: GivenFile, choices: ImportChoices): Promise<FileKind> {
  const chosen = file.kind ?? choicesFor(file, choices).kind;
  if (chosen) return chosen;
  return await recogniseFile(file.path, file.name, sheetOf(file, choices));
}

/** The sheet of a workbook that a person chose. */
function sheetOf(file: GivenFile, choices: ImportChoices): string | undefined {
  const sheet: unknown = choicesFor(file, choices).mapping?.sheet;
  return typeof sheet === 'string' ? sheet : undefined;
}

/** Options by which a flow file is looked at and read.
 *  @throws IntakeError for a mapping that is none */
export function flowOptions(about: {
  file: GivenFile;
  choices: ImportChoices;
  registry: KnownStation[] | null;
}): InspectOptions {
  const { mapping, unit, station, matchCodes } = choicesFor(about.file, about.choices);
  return {
    fileName: about.file.name,
    ...(mapping === undefined ? {} : { mapping: parseMapping(mapping, about.file.name) }),
    ...{ unit, station, matchCodes, knownStations: about.registry },
  };
}

/** Reads a file into the staging database.
 *  @throws IntakeError when it cannot be taken; the signal's reason */
export function stageFile(file: GivenFile, kind: FileKind, tools: StageTools): Promise<StagedFile> {
  return { registry: stageRegistry, layer: stageLayer, flows: stageFlows }[kind](file, tools);
}

async function stageRegistry(file: GivenFile, { staging, choices, near }: StageTools): Promise<StagedFile> {
  const { corrections, areaUnit, mapping } = choicesFor(file, choices);
  const options = { corrections, areaUnit, sheet: mapping?.sheet, near };
  const { stations, rows, given, sha256, warnings } = await readRegistry(file.path, file.name, options);
  const number = staging.addFile({ kind: 'registry', fileName: file.name });
  staging.stageRegistry(number, stations, given);
  staging.describeFile(number, { sha256, rows, accepted: stations.length, report: { warnings } });
  return {
    ...{ file, kind: 'registry', rows, warnings, report: null },
    summary: counted(stations.length, 'station'),
    registry: stations.map(({ code, name }) => ({ code, name })),
  };
}

async function stageLayer(file: GivenFile, { staging, choices }: StageTools): Promise<StagedFile> {
  const layer = { ...(await readLayer(file.path, file.name)), ...choicesFor(file, choices).layer };
  const { name, kind, geojson, features, bounds, sha256, warnings } = layer;
  const number = staging.addFile({ kind: 'layer', fileName: file.name });
  staging.stageLayer(number, { name, kind, geojson });
  staging.describeFile(number, { sha256, rows: features, accepted: features, report: { warnings, bounds, kind } });
  const summary = `${counted(features, kind === 'other' ? 'shape' : kind)}`;
  return { file, kind: 'layer', summary, rows: features, report: null, warnings, registry: null };
}

async function stageFlows(file: GivenFile, tools: StageTools): Promise<StagedFile> {
  const { staging, jobId, fileNumber, signal, onProgress } = tools;
  const options = flowOptions({ file, choices: tools.choices, registry: tools.registry });
  const { recorded } = choicesFor(file, tools.choices);
  const number = staging.addFile({ kind: 'flows', fileName: recorded?.fileName ?? file.name });
  const rejected = rejectedRowsFile(jobId, fileNumber);
  let report: ImportReport;
  try {
    report = await readFlows(file.path, {
      ...options,
      ...{ signal, onProgress, scratch: `${staging.path}-pages` },
      onRejected: (row) => rejected.write(row),
      emit: (part) => staging.stagePart(number, part),
    });
  } catch (error) {
    rejected.discard();
    throw error;
  }
  report = { ...report, rejectedFile: rejected.close() };
  const { sha256, layout, unit, mapping, rows, accepted, rejectedTotal } = report;
  staging.stageFacts(number, report.facts ?? []);
  const facts = { sha256, layout, unit, mapping, rows, accepted, rejected: rejectedTotal, report };
  staging.describeFile(number, recorded ? { ...facts, ...asFirstImported(recorded) } : facts);
  return {
    ...{ file, kind: 'flows', rows, report, warnings: report.warnings, registry: null },
    // a station stands once for each of its quantities
    summary: `${counted(new Set(report.stations.map(({ code }) => code)).size, 'station')}, ${counted(accepted, 'row')}`,
  };
}

/** What the list of imports tells of a file that was imported elsewhere before: what it told there. */
function asFirstImported({ fileName: _name, kind: _kind, file: _file, read: _read, ...first }: ArchivedImport) {
  return { ...first, createdAt: timestamp(new Date(first.createdAt)) };
}

const counted = (count: number, noun: string): string => `${count} ${noun}${count === 1 ? '' : 's'}`;
