import { createHash } from 'node:crypto';
import { findDateOrder } from './date-order.ts';
import { conflictError, DayConflict } from './day-conflict.ts';
import { readHead } from './file-blocks.ts';
import { recognise } from './recognise/recognise.ts';
import { RecordSink } from './record-sink.ts';
import { Rejections } from './rejections.ts';
import { countMissingNumbers, stagedPart, stationReport } from './report.ts';
import { RowLoop } from './rows/row-loop.ts';
import { type TableReading, tableReading } from './table-reading.ts';
import { type FlowUnit, type ImportReport, IntakeError, type ReadFlowsOptions, type StationReport } from './types.ts';

/** Reads a file of daily flows, whatever its size, and hands on one part for each station once all of it is good.
 *
 *  The layout, delimiter, dates, unit and stations are recognised from the content; what was given goes before. Rows
 *  that cannot be read are rejected one by one, with their number, text and reason; two unlike values for a day, an
 *  unknown station, or anything that leaves the meaning of the file open refuses the whole file.
 *  @returns counts in the unit of the file; `rejectedFile` is null, for the caller to fill in
 *  @throws IntakeError naming file, row, value and remedy; the signal's reason when aborted */
export async function readFlows(path: string, options: ReadFlowsOptions): Promise<ImportReport> {
  const head = await readHead(path, options.fileName);
  const plan = recognise(head, options);
  if (plan.problems.length > 0) throw plan.problems[0];
  if (plan.orderOpen)
    plan.mapping.date = { ...plan.mapping.date, order: await findDateOrder(path, plan, { signal: options.signal }) };

  const hash = createHash('sha256');
  const rejections = new Rejections(options.onRejected);
  const sink = new RecordSink();
  const reading = tableReading(plan, options, sink);
  let bytesRead = 0;
  const loop = new RowLoop(plan, reading.reader, {
    ...{ signal: options.signal, rejections },
    onBytes: (bytes) => {
      bytesRead += bytes.length;
      hash.update(bytes);
    },
    onBlock: (rows) => options.onProgress?.(rows, bytesRead, head.size),
  });
  try {
    await loop.read(path);
  } catch (error) {
    if (!(error instanceof DayConflict)) throw error;
    const code = reading.stations.codes[error.station];
    // A header met on the way may have moved the columns: recognise anew.
    const again = { ...recognise(head, options), mapping: plan.mapping };
    throw await conflictError(path, again, error, code, (other) => tableReading(again, options, other).reader);
  }

  const rows = loop.rows - reading.leftOut();
  if (rows === rejections.total && reading.stations.codes.length <= 1) throw nothingTaken(plan.file, rows, rejections);
  const { stations, warnings } = handOn(plan.mapping.unit as FlowUnit, reading, sink, options);
  return {
    file: options.fileName,
    ...{ layout: plan.mapping.layout, unit: plan.mapping.unit as FlowUnit, mapping: plan.mapping },
    ...{ rows, accepted: rows - rejections.total, rejectedTotal: rejections.total, rejectedFile: null },
    ...{ rejected: rejections.first, stations, sha256: hash.digest('hex') },
    warnings: [...plan.warnings, ...readingWarnings(loop, reading, sink), ...warnings],
  };
}

/** Emits each station's part and drops it, so that no more than one is held twice. */
function handOn(
  unit: FlowUnit,
  { stations, codes }: TableReading,
  sink: RecordSink,
  options: ReadFlowsOptions,
): { stations: StationReport[]; warnings: string[] } {
  const reports: StationReport[] = [];
  const missingNumbers = new Map<string, number>();
  for (const [number, code] of stations.codes.entries()) {
    const record = sink.records[number];
    const run = record?.run() ?? null;
    if (record === undefined || run === null) continue;
    const part = stagedPart(code, unit, run, codes.codes);
    record.clear();
    reports.push(stationReport(part, record.duplicates));
    countMissingNumbers(part, missingNumbers);
    options.emit(part);
  }
  const warnings = [...missingNumbers].map(([text, days]) => `“${text}” was read as missing, on ${days} station days.`);
  return { stations: reports, warnings };
}

function readingWarnings(loop: RowLoop, reading: TableReading, sink: RecordSink): string[] {
  const warnings: [number, (count: number) => string][] = [
    [reading.values.negatives, (count) => `${count} values are negative; they were taken as written.`],
    [reading.leftOut(), (count) => `${count} rows of other quantities were left out.`],
    [sink.filled, (count) => `${count} days stand twice, once with a value and once without; the value was taken.`],
    [
      sink.otherCodes,
      (count) => `${count} days stand twice with equal values and unlike flags; the first flag was kept.`,
    ],
    [loop.endsOpen ? 1 : 0, () => 'The last row has no line end: make sure that the file was not cut short.'],
  ];
  return warnings.flatMap(([count, words]) => (count > 0 ? [words(count)] : []));
}

function nothingTaken(file: string, rows: number, rejections: Rejections): IntakeError {
  const first = rejections.first[0];
  if (first === undefined) {
    return new IntakeError({
      file,
      message: 'no row of the file holds a flow',
      remedy: 'Check that it is a file of daily flows, and the mapping if one was given',
    });
  }
  return new IntakeError({
    file,
    row: first.row,
    value: first.text.slice(0, 200),
    message: `none of its ${rows} rows can be read; of the first, ${first.reason}`,
    remedy: 'Check the layout, and give a mapping where it was taken for another',
    rows: rejections.first,
  });
}
