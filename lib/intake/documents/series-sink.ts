import { isoDate } from '../../calendar/day.ts';
import type { DayCode } from '../../series/day-codes.ts';
import { PageMemory } from '../page-memory.ts';
import { REPORTED_ROWS } from '../rejections.ts';
import { stationReport } from '../report.ts';
import { StationCodes, stationInFileName } from '../station-codes.ts';
import {
  type FoundFacts,
  type InspectOptions,
  IntakeError,
  type RejectedRow,
  type StagedPart,
  type StationReport,
  type Unit,
} from '../types.ts';
import { DayCodes, type PointCode } from './day-codes.ts';
import { labelOf, type SeriesHead, unitOfHead } from './series-head.ts';
import type { SeriesLook } from './series-look.ts';
import { stepProblem, unitsDiffer } from './series-problems.ts';
import { SeriesRecord } from './series-record.ts';
import { type StampMeaning, TimeStamp } from './time-stamp.ts';
import { ValueText } from './value-text.ts';
import { type Wanted, WantedSeries } from './wanted-series.ts';

const MOST_WARNINGS = 50;

/** A point of a series as the document writes it. */
export interface Point extends PointCode {
  time: string;
  value: string;
  /** where it differs from that of the series */
  meaning?: StampMeaning;
}

/** Where the readers of all documents put their series: chooses those that are wanted, lays their points into days and
 *  keeps count of the rest. */
export class SeriesSink {
  readonly wanted: WantedSeries;
  readonly warnings = new Set<string>();
  readonly rejected: RejectedRow[] = [];
  readonly stations: StationCodes;
  rows = 0;
  rejectedTotal = 0;
  /** series with points, and those without */
  series = 0;
  emptySeries = 0;
  /** series of categories in place of numbers */
  categories = 0;
  /** points with neither time nor value */
  emptyPoints = 0;
  /** false when a series of the main quantity names no station */
  namesStations = true;
  /** a series of the main quantity has come */
  hasMain = false;
  /** unit of the first series of the main quantity */
  mainUnit: Unit | null = null;
  private readonly values: ValueText;
  private readonly stamp = new TimeStamp();
  private readonly memory: PageMemory;
  private readonly records = new Map<string, SeriesRecord>();
  private readonly facts = new Map<string, FoundFacts>();
  /** what qualifiers mean, as the document explains them */
  private readonly meaning = new Map<string, number>();
  private head: SeriesHead | null = null;
  private station = '';
  private record: SeriesRecord | null = null;
  private current: Wanted | null = null;

  /** @param look  where only the first points are looked at: gathers what they show, and problems in place of throwing them */
  constructor(
    private readonly options: InspectOptions & { onRejected?(row: RejectedRow): void; scratch?: string },
    private readonly look: SeriesLook | null = null,
  ) {
    const { fileName, knownStations = null, matchCodes, mapping } = options;
    this.memory = new PageMemory({ scratch: options.scratch });
    this.wanted = new WantedSeries(options);
    this.stations = new StationCodes(fileName, knownStations, { matchCodes, lenient: look !== null });
    this.values = new ValueText(mapping?.missing ?? []);
  }

  /** Ends the use of what the records lie in. */
  close(): void {
    this.memory.close();
  }

  warn(text: string): void {
    if (this.warnings.size < MOST_WARNINGS) this.warnings.add(text);
  }

  /** A series begins, whose points follow. */
  begin(head: SeriesHead): void {
    this.head = head;
    this.record = null;
    this.series++;
    this.current = this.wanted.choose(head);
    if (this.current === null) return;
    const { quantity, main } = this.current;
    const { fileName } = this.options;
    const unitProblem = this.wanted.unitProblem(fileName, head, this.current);
    if (unitProblem) this.refuse(unitProblem);
    const own = unitOfHead(head, quantity);
    if (own !== null && own !== this.current.unit) {
      this.warn(`“${labelOf(head)}” says ${own}; its values were read as ${this.current.unit}, as given.`);
    }
    if (head.stepDays !== null && head.stepDays > 1.5) this.refuse(stepProblem(fileName, head));
    this.station = this.stationOf(head);
    const unit = this.current.unit as Unit;
    const key = `${quantity}\u0000${this.station}`;
    let record = this.records.get(key);
    if (record !== undefined && record.unit !== unit) throw unitsDiffer(fileName, this.station, record.unit, unit);
    if (record === undefined) {
      const codes = new DayCodes(fileName, this.options.mapping?.flags);
      const { dailyMean } = this.options.mapping ?? {};
      record = new SeriesRecord({ file: fileName, code: this.station, quantity, unit }, codes, {
        ...{ memory: this.memory, dailyMean },
      });
      this.records.set(key, record);
    }
    this.record = record;
    if (main) {
      this.hasMain = true;
      this.learn(head);
      this.mainUnit ??= unit;
      if (head.names.length === 0) this.namesStations = false;
    }
    if (head.meaning === 'end') {
      this.warn('Values are means of the time before their stamp: one stamped at midnight is that of the day before.');
    }
  }

  /** Takes a point of the series begun last. */
  point(point: Point): void {
    const { head, record } = this;
    if (head === null) throw new RangeError('SeriesSink.point: a series must have begun');
    if (record === null) {
      this.wanted.sample(head, point.value);
      return;
    }
    this.rows++;
    const code = this.options.mapping?.flag === null ? { ...point, flag: '', bits: 0 } : point;
    const problem = this.take(head, record, code);
    if (problem === null) return;
    this.rejectedTotal++;
    const row = {
      row: this.rows,
      text: `${this.station} ${point.time} ${point.value} ${point.flag}`.trim(),
      reason: problem,
    };
    if (this.rejected.length < REPORTED_ROWS) this.rejected.push(row);
    this.options.onRejected?.(row);
  }

  /** @returns why the point is not taken; null when it is */
  private take(head: SeriesHead, record: SeriesRecord, point: Point): string | null {
    const problem =
      this.stamp.read(point.time) ??
      (this.values.read(point.value, head.noData) ? null : `“${point.value.slice(0, 60)}” is not a number`);
    const valueText = point.valueText ?? this.values.text;
    const code: PointCode = { flag: point.flag, bits: point.bits, exact: point.exact, valueText };
    if (this.look?.isFull === false && this.current?.main) this.show(this.look, point, record.codes.of(code), problem);
    if (problem === null) {
      try {
        const meant = point.meaning === undefined ? head : { ...head, meaning: point.meaning };
        record.put(meant, this.stamp, this.values.value, code, this.rows);
      } catch (error) {
        if (this.look === null || !(error instanceof IntakeError)) throw error;
        this.refuse(error);
      }
    }
    return problem;
  }

  private show(look: SeriesLook, point: Point, { text, bits }: DayCode, problem: string | null): void {
    const day = this.stamp.dailyDay(point.meaning ?? this.head?.meaning ?? 'instant');
    look.show([this.station, point.time, point.value, point.flag], {
      ...{ row: this.rows, station: this.station, date: problem === null ? isoDate(day) : null },
      value: problem === null && !Number.isNaN(this.values.value) ? this.values.value : null,
      ...{ flag: text, bits, problem },
    });
  }

  /** Keeps what the document says of its qualifiers.
   *  @param bits  FLAG bits by qualifier */
  explain(bits: ReadonlyMap<string, number>): void {
    for (const [code, meaning] of bits) this.meaning.set(code, (this.meaning.get(code) ?? 0) | meaning);
    this.record?.codes.explain(bits);
  }

  private stationOf({ names }: SeriesHead): string {
    const { knownStations, station, fileName } = this.options;
    const known = names.find((name) =>
      knownStations?.some((one) => one.code === name || one.name.trim().toLowerCase() === name.toLowerCase()),
    );
    const name = known ?? names[0] ?? station ?? stationInFileName(fileName);
    const number = this.stations.add(name, names.length > 0 ? this.rows + 1 : undefined);
    return this.stations.codes[number];
  }

  private learn(head: SeriesHead): void {
    if (Object.values(head.facts).some((fact) => fact !== undefined)) {
      this.facts.set(this.station, { ...head.facts, ...this.facts.get(this.station), code: this.station });
    }
  }

  private refuse(problem: IntakeError): void {
    if (this.look === null) throw problem;
    this.look.note(problem);
  }

  /** Adds to the problems what stands against the records themselves: several values a day, or one a month. */
  checkRecords(): void {
    for (const record of this.records.values()) {
      try {
        record.check();
      } catch (error) {
        if (!(error instanceof IntakeError)) throw error;
        this.refuse(error);
      }
    }
  }

  /** The facts of the stations, as far as the document states any. */
  foundFacts(): FoundFacts[] {
    return [...this.facts.values()];
  }

  get negatives(): number {
    return this.values.negatives;
  }

  /** Days of the records handed on whose readings covered too little. */
  get thinDays(): number {
    return [...this.records.values()].reduce((sum, record) => sum + record.thinDays, 0);
  }

  /** Hands every record on and gives its memory back.
   *  @throws IntakeError for values that are not daily, before anything is handed on */
  *parts(): Generator<[StagedPart, StationReport]> {
    for (const record of this.records.values()) record.check();
    for (const record of this.records.values()) {
      const part = record.part();
      if (part === null) continue;
      const report = stationReport(part, record.duplicates);
      yield [part, part.quantity === undefined ? report : { ...report, quantity: part.quantity }];
    }
  }
}
