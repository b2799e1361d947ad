import { createHash } from 'node:crypto';
import type { FileHead } from '../file-blocks.ts';
import {
  type ImportReport,
  type Inspection,
  type InspectOptions,
  IntakeError,
  type Mapping,
  type ReadFlowsOptions,
  type StationReport,
  type Unit,
} from '../types.ts';
import { encodingOf } from './decode-text.ts';
import type { TextReading } from './read-text.ts';
import { SeriesLook } from './series-look.ts';
import { nothingTaken } from './series-problems.ts';
import { SeriesSink } from './series-sink.ts';
import type { DocumentLayout } from './sniff.ts';

/** Bytes looked at for an inspection, more only where no point of the wanted series has come by then. */
const LOOKED_AT = 4 << 20;

/** Reads documents of time series, whose values have no place by column. */
export interface DocumentReader {
  layout: DocumentLayout;
  /** What the document holds and what must be answered before it can be read.
   *  @returns `mapping: null` when it cannot be read whatever is answered; never throws IntakeError */
  inspect(path: string, options: InspectOptions): Promise<Inspection>;
  /** Reads the document whole, whatever its size; emits one part a station and quantity when all of it is good.
   *  @throws IntakeError; the signal's reason when aborted */
  read(path: string, options: ReadFlowsOptions): Promise<ImportReport>;
}

/** Tells a document's series to a sink, from its first byte to its last or until enough is known. */
export type DocumentParser = (
  path: string,
  reading: TextReading,
  sink: SeriesSink,
  enough: () => boolean,
) => Promise<void>;

/** A reader around the parser of one kind of document. */
export function readerOf(layout: DocumentLayout, head: FileHead, parse: DocumentParser): DocumentReader {
  const readingFor = (fileName: string, sink: SeriesSink): TextReading => {
    const encoding = encodingOf(head.bytes, fileName);
    if (encoding.warning) sink.warn(encoding.warning);
    return { file: fileName, encoding };
  };
  return {
    layout,
    async inspect(path, options) {
      const look = new SeriesLook();
      const sink = new SeriesSink(options, look);
      let bytes = 0;
      try {
        const reading = readingFor(options.fileName, sink);
        const onBytes = (chunk: Uint8Array) => {
          bytes += chunk.length;
        };
        await parse(path, { ...reading, onBytes }, sink, () => bytes > LOOKED_AT && look.isFull);
        sink.checkRecords();
        const none = nothingTaken(options.fileName, sink);
        if (none) look.problems.push(none);
      } catch (error) {
        if (!(error instanceof IntakeError)) throw error;
        look.problems.push(error);
      }
      return inspectionOf(layout, options, { sink, look });
    },
    async read(path, options) {
      const sink = new SeriesSink(options);
      try {
        return await readInto(sink, path, options);
      } finally {
        sink.close();
      }
    },
  };

  async function readInto(sink: SeriesSink, path: string, options: ReadFlowsOptions): Promise<ImportReport> {
    const hash = createHash('sha256');
    let bytes = 0;
    const onBytes = (chunk: Uint8Array) => {
      bytes += chunk.length;
      hash.update(chunk);
      options.onProgress?.(sink.rows, bytes, head.size);
    };
    const reading = { ...readingFor(options.fileName, sink), signal: options.signal, onBytes };
    await parse(path, reading, sink, () => false);
    const problem = nothingTaken(options.fileName, sink) ?? sink.stations.problem();
    if (problem) throw problem;
    const stations: StationReport[] = [];
    let unit: Unit | null = null;
    for (const [part, report] of sink.parts()) {
      if ((part.quantity ?? 'flow') === sink.wanted.main) unit ??= part.unit;
      stations.push(report);
      options.emit(part);
    }
    const facts = sink.foundFacts();
    return {
      ...{ file: options.fileName, layout, unit: unit ?? 'm3/s', mapping: mappingOf(layout, options, unit, sink) },
      ...{ rows: sink.rows, accepted: sink.rows - sink.rejectedTotal, rejectedTotal: sink.rejectedTotal },
      ...{ rejectedFile: null, rejected: sink.rejected, stations, sha256: hash.digest('hex') },
      warnings: warningsOf(sink),
      ...(facts.length > 0 ? { facts } : {}),
    };
  }
}

function mappingOf(layout: DocumentLayout, options: InspectOptions, unit: Unit | null, sink: SeriesSink): Mapping {
  const { mapping, station } = options;
  return {
    ...{ layout, station: stationOf(station, sink), date: { columns: ['time'], order: 'ymd' } },
    ...{ value: { column: 'value' }, flag: mapping?.flag === null ? null : { column: 'qualifier' } },
    ...{ unit, missing: mapping?.missing ?? [], decimal: '.' },
    ...(mapping?.quantity === undefined ? {} : { quantity: mapping.quantity }),
    ...(mapping?.where === undefined ? {} : { where: mapping.where }),
    ...(mapping?.also === undefined ? {} : { also: mapping.also }),
    ...(mapping?.flags === undefined ? {} : { flags: mapping.flags }),
    ...(mapping?.dailyMean === undefined ? {} : { dailyMean: mapping.dailyMean }),
  };
}

/** The document names its stations; where it does not, what was given does, or the file's name. */
function stationOf(given: string | undefined, sink: SeriesSink): Mapping['station'] {
  if (sink.namesStations) return { from: 'header' };
  return given === undefined ? { from: 'file-name' } : { from: 'given', code: given };
}

function inspectionOf(
  layout: DocumentLayout,
  options: InspectOptions,
  { sink, look }: { sink: SeriesSink; look: SeriesLook },
): Inspection {
  const asked = sink.stations.problem();
  const problems = [...look.problems, ...[...sink.stations.strangers.values()].slice(0, 1), ...(asked ? [asked] : [])];
  const readable = problems.every(({ problem }) => problem.needs !== undefined);
  return {
    mapping: readable ? mappingOf(layout, options, sink.mainUnit, sink) : null,
    ...{ header: null, preview: look.preview, problems, valueCandidates: [], understood: look.understood },
    ...{ others: [...sink.wanted.others.values()], facts: sink.foundFacts(), sheets: null },
  };
}

function warningsOf(sink: SeriesSink): string[] {
  const counted: [number, (count: number) => string][] = [
    [sink.emptySeries, (count) => `${count} series without values were left out.`],
    [sink.wanted.others.size, () => `Not read: ${[...sink.wanted.others.keys()].slice(0, 10).join('; ')}.`],
    [sink.categories, (count) => `${count} series of categories were left out.`],
    [sink.emptyPoints, (count) => `${count} points with neither time nor value were left out.`],
    [sink.negatives, (count) => `${count} values are negative; they were taken as written.`],
    [sink.thinDays, (count) => `${count} days have too few readings for a mean; they are missing.`],
  ];
  const texts = counted.flatMap(([count, words]) => (count > 0 ? [words(count)] : []));
  return [...sink.warnings, ...texts, ...sink.stations.warnings()];
}
