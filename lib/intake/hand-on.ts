import { DAY_SECONDS, isoDate } from '../calendar/day.ts';
import { DailyMeans } from './daily-means.ts';
import { spacingProblem, sparseSpacing } from './day-spacing.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import type { RecordSink } from './record-sink.ts';
import { countMissingNumbers, stagedPart, stationReport } from './report.ts';
import { RowLoop } from './rows/row-loop.ts';
import type { DaySink } from './rows/row-reader.ts';
import { type TableReading, tableReading } from './table-reading.ts';
import type { Quantity, ReadFlowsOptions, StagedPart, StationReport, Unit } from './types.ts';

interface Handing {
  path: string;
  plan: TablePlan;
  reading: TableReading;
  sink: RecordSink | DailyMeans;
  options: ReadFlowsOptions;
}

/** Emits each station's part and drops it, so that no more than one is held twice.
 *  @throws IntakeError, before any is emitted, for records that are not daily */
export async function handOn(handing: Handing): Promise<{ stations: StationReport[]; warnings: string[] }> {
  const { plan, reading, sink, options } = handing;
  if (!(sink instanceof DailyMeans)) refuseSparse(plan.file, sink, reading.stations.codes);
  const { unit, quantity } = plan.mapping;
  const about = { unit: unit as Unit, ...(quantity === undefined || quantity === 'flow' ? {} : { quantity }) };
  const reports: StationReport[] = [];
  const missingNumbers = new Map<string, number>();
  const today = options.today ?? lastDayBegun();
  let future = 0;
  for (const [number, code] of reading.stations.codes.entries()) {
    const taken = takePart(sink, number, { code, ...about }, reading);
    if (taken === null) continue;
    reports.push({ ...stationReport(taken.part, taken.duplicates), ...quantityOf(about) });
    countMissingNumbers(taken.part, missingNumbers);
    future += daysBehind(taken.part, today);
    options.emit(taken.part);
  }
  return {
    stations: reports,
    warnings: [
      ...[...missingNumbers].map(([text, days]) => `“${text}” was read as missing, on ${days} station days.`),
      ...(sink instanceof DailyMeans ? meansWarnings(sink, plan.mapping.dailyMean ?? 0) : []),
      ...(future > 0 ? [await futureWarning(handing, today, future)] : []),
    ],
  };
}

const quantityOf = ({ quantity }: { quantity?: Quantity }) => (quantity === undefined ? {} : { quantity });

function takePart(
  sink: RecordSink | DailyMeans,
  station: number,
  about: Pick<StagedPart, 'code' | 'unit' | 'quantity'>,
  reading: TableReading,
): { part: StagedPart; duplicates: number } | null {
  if (sink instanceof DailyMeans) {
    const part = sink.part(station, about);
    return part === null ? null : { part, duplicates: 0 };
  }
  const record = sink.records[station];
  const run = record?.run() ?? null;
  if (record === undefined || run === null) return null;
  const part = { ...stagedPart(about.code, about.unit, run, reading.codes.codes), ...quantityOf(about) };
  record.clear();
  return { part, duplicates: record.duplicates };
}

/** One value a month is no daily record, and would look like one with long gaps. */
function refuseSparse(file: string, sink: RecordSink, codes: readonly string[]): void {
  for (const [station, record] of sink.records.entries()) {
    if (record === undefined || record.hasNeighbours()) continue;
    const run = record.run();
    if (run === null) continue;
    const days = [...run.values.keys()].filter((at) => !Number.isNaN(run.values[at]));
    const spacing = sparseSpacing(days);
    if (spacing !== null) throw spacingProblem(file, codes[station], spacing);
  }
}

/** Number of the latest day that has begun anywhere on Earth, where clocks are at most 14 hours ahead. */
function lastDayBegun(): number {
  return Math.floor((Date.now() / 1000 + 14 * 3600) / DAY_SECONDS);
}

function daysBehind({ values, firstDay }: StagedPart, today: number): number {
  let count = 0;
  for (let at = Math.max(0, today + 1 - firstDay); at < values.length; at++) if (!Number.isNaN(values[at])) count++;
  return count;
}

/** Waits for the first value of a day behind today. */
class FutureSink implements DaySink {
  line = -1;
  day = 0;
  constructor(private readonly today: number) {}

  take(_station: number, day: number, value: number, _code: number, line: number): void {
    if (this.line >= 0 || day <= this.today || Number.isNaN(value)) return;
    this.line = line;
    this.day = day;
  }
}

/** The row of the first future day is found by reading the file again: hardly any file has one. */
async function futureWarning({ path, plan, options }: Handing, today: number, count: number): Promise<string> {
  const sink = new FutureSink(today);
  const { reader } = tableReading(plan, options, sink);
  await new RowLoop(plan, reader, { signal: options.signal, stop: () => sink.line >= 0 }).read(path);
  const days = count === 1 ? '1 value lies' : `${count} values lie`;
  return `${days} in the future, the first in row ${sink.line} (${isoDate(sink.day)}); they were kept, and are marked by the checks.`;
}

function meansWarnings({ thinDays, repeated, backwards }: DailyMeans, share: number): string[] {
  const percent = Math.round(share * 100);
  const warnings: [number, (count: number) => string][] = [
    [1, () => `Values are means of the day’s readings, where these cover at least ${percent} % of it.`],
    [thinDays, (count) => `${count} days with too few readings are missing.`],
    [repeated, (count) => `${count} readings stand twice; they were counted once.`],
    [
      backwards,
      (count) => `${count} readings are earlier than the one before: make sure that no stretch stands twice.`,
    ],
  ];
  return warnings.flatMap(([count, words]) => (count > 0 ? [words(count)] : []));
}
