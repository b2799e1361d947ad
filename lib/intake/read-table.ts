import { createHash } from 'node:crypto';
import { DailyMeans } from './daily-means.ts';
import { findDateOrder } from './date-order.ts';
import { conflictError, DayConflict } from './day-conflict.ts';
import type { FileHead } from './file-blocks.ts';
import { firstLook } from './first-look.ts';

import { handOn } from './hand-on.ts';
import { nothingTaken, readingWarnings, unreadWarnings } from './reading-warnings.ts';
import { recognise } from './recognise/recognise.ts';
import { factsOf } from './recognise/stated-facts.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import { RecordSink } from './record-sink.ts';
import { Rejections } from './rejections.ts';
import { RowLoop } from './rows/row-loop.ts';
import { type TableReading, tableReading } from './table-reading.ts';
import { TimedRows } from './timed-rows.ts';
import type { AlsoQuantity, ImportReport, ReadFlowsOptions, Unit } from './types.ts';
import { unitOfQuantityProblem } from './unit-of-quantity.ts';

/** Reads a table of text: the quantity that its mapping names, then each that the mapping asks for beside it, in a reading
 *  of its own. Counts of rows are those of the first.
 *  @param head  of the file
 *  @throws IntakeError naming file, row, value and remedy; the signal's reason when aborted */
export async function readTable(path: string, head: FileHead, options: ReadFlowsOptions): Promise<ImportReport> {
  const report = await readQuantity(path, head, options);
  const stations = [...report.stations];
  const warnings = [...report.warnings];
  for (const also of report.mapping.also ?? []) {
    const other = await readQuantity(path, head, optionsFor(also, report, options));
    stations.push(...other.stations);
    const own = other.warnings.filter((warning) => !report.warnings.includes(warning));
    warnings.push(...[...unreadWarnings(other), ...own].map((warning) => `Of ${also.quantity}: ${warning}`));
  }
  return { ...report, stations, warnings };
}

/** The file's own mapping with another quantity's columns laid over. */
function optionsFor(also: AlsoQuantity, { mapping }: ImportReport, options: ReadFlowsOptions): ReadFlowsOptions {
  const { quantity, unit, value, flag, where } = also;
  const { also: _, ...own } = mapping;
  return {
    ...options,
    mapping: {
      ...{ ...own, quantity, unit, value },
      ...(flag === undefined ? {} : { flag }),
      ...(where === undefined ? {} : { where }),
    },
    unit: undefined,
    onProgress: undefined,
    onRejected: undefined,
  };
}

async function readQuantity(path: string, head: FileHead, options: ReadFlowsOptions): Promise<ImportReport> {
  const plan = recognise(head, options);
  const wrong = plan.problems[0] ?? unitOfQuantityProblem(plan.file, plan.mapping);
  if (wrong) throw wrong;
  if (plan.orderOpen)
    plan.mapping.date = { ...plan.mapping.date, order: await findDateOrder(path, plan, { signal: options.signal }) };
  const several = firstLook(plan, head, options).problems.find(({ problem }) => problem.needs === 'daily-mean');
  if (several) throw several;

  const { sink, reading } = sinkAndReading(plan, options);
  try {
    return await readInto(sink, { path, head, plan, reading, options });
  } finally {
    if (sink instanceof RecordSink) sink.close();
  }
}

interface Table {
  path: string;
  head: FileHead;
  plan: TablePlan;
  reading: TableReading;
  options: ReadFlowsOptions;
}

async function readInto(sink: RecordSink | DailyMeans, table: Table): Promise<ImportReport> {
  const { path, head, plan, reading, options } = table;
  const hash = createHash('sha256');
  const rejections = new Rejections(options.onRejected);
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
    // A header met on the way may have moved the columns: recognise anew.
    const again = { ...recognise(head, options), mapping: plan.mapping };
    const code = reading.stations.codes[error.station];
    throw await conflictError(path, again, error, code, (other) => tableReading(again, options, other).reader);
  }

  const asked = reading.stations.problem();
  if (asked) throw asked;
  const rows = loop.rows - reading.leftOut();
  if (rows === rejections.total && reading.stations.codes.length <= 1) throw nothingTaken(plan.file, rows, rejections);
  const { mapping } = plan;
  const facts = factsOf(plan.facts, reading.stations.codes);
  const handed = await handOn({ path, plan, reading, sink, options });
  return {
    file: options.fileName,
    ...{ layout: mapping.layout, unit: mapping.unit as Unit, mapping },
    ...{ rows, accepted: rows - rejections.total, rejectedTotal: rejections.total, rejectedFile: null },
    ...{ rejected: rejections.first, stations: handed.stations, sha256: hash.digest('hex') },
    warnings: [
      ...plan.warnings,
      ...readingWarnings(loop, reading, sink, mapping.quantity ?? 'flow'),
      ...reading.stations.warnings(),
      ...handed.warnings,
    ],
    ...(facts.length > 0 ? { facts } : {}),
  };
}

/** What takes the values of a table: records of days, or the means of several values a day where these are asked for. */
function sinkAndReading(
  plan: TablePlan,
  options: ReadFlowsOptions,
): { sink: RecordSink | DailyMeans; reading: TableReading } {
  const share = plan.mapping.dailyMean;
  if (share === undefined) {
    const sink = new RecordSink({ scratch: options.scratch });
    return { sink, reading: tableReading(plan, options, sink) };
  }
  const means = new DailyMeans([], share);
  const reading = tableReading(plan, options, means);
  means.codes = reading.codes.codes;
  return { sink: means, reading: { ...reading, reader: new TimedRows(plan, reading.reader, means) } };
}
