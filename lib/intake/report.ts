import { isoDate } from '../calendar/day.ts';
import { type DayCode, NO_ROW } from '../series/day-codes.ts';
import type { DayRun } from './station-days.ts';
import type { StagedPart, StationReport, Unit } from './types.ts';

/** One station's days with the codes it uses, and no others. */
export function stagedPart(code: string, unit: Unit, run: DayRun, fileCodes: readonly DayCode[]): StagedPart {
  const renumbered = new Int16Array(256).fill(-1);
  const codeList: DayCode[] = [];
  const codes = new Uint8Array(run.codes.length);
  for (let at = 0; at < codes.length; at++) {
    const fileCode = run.codes[at];
    if (fileCode === NO_ROW) {
      codes[at] = NO_ROW;
      continue;
    }
    if (renumbered[fileCode] < 0) renumbered[fileCode] = codeList.push(fileCodes[fileCode]) - 1;
    codes[at] = renumbered[fileCode];
  }
  return { code, unit, firstDay: run.firstDay, values: run.values, codes, codeList };
}

/** Counts of one station, in the unit of the file. A gap is a stretch of days without a value between the first value
 *  and the last, whether the file has rows for them or not. */
export function stationReport(part: StagedPart, duplicates: number): StationReport {
  const { values, codes, firstDay } = part;
  const report = { values: 0, missing: 0, zeros: 0, gaps: 0, longestGapDays: 0, duplicates };
  let first = -1;
  let last = -1;
  let min = Number.POSITIVE_INFINITY;
  let max = Number.NEGATIVE_INFINITY;
  for (let at = 0; at < values.length; at++) {
    const value = values[at];
    if (Number.isNaN(value)) {
      if (codes[at] !== NO_ROW) report.missing++;
      continue;
    }
    const gap = at - last - 1;
    if (first < 0) first = at;
    else if (gap > 0) {
      report.gaps++;
      report.longestGapDays = Math.max(report.longestGapDays, gap);
    }
    last = at;
    report.values++;
    if (value === 0) report.zeros++;
    if (value < min) min = value;
    if (value > max) max = value;
  }
  const hasValues = first >= 0;
  return {
    ...{ code: part.code, values: report.values, missing: report.missing },
    first: hasValues ? isoDate(firstDay + first) : null,
    last: hasValues ? isoDate(firstDay + last) : null,
    ...{ zeros: report.zeros, min: hasValues ? min : null, max: hasValues ? max : null },
    ...{ gaps: report.gaps, longestGapDays: report.longestGapDays, duplicates },
  };
}

/** Days on which each text stood for a missing value, for the warnings: a number taken for "missing" must be seen. */
export function countMissingNumbers(part: StagedPart, counts: Map<string, number>): void {
  const numeric = part.codeList.map(({ valueText }) =>
    valueText !== undefined && /\d/.test(valueText) ? valueText : null,
  );
  if (numeric.every((text) => text === null)) return;
  for (const code of part.codes) {
    const text = code === NO_ROW ? null : numeric[code];
    if (text !== null) counts.set(text, (counts.get(text) ?? 0) + 1);
  }
}
