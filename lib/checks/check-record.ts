import type { DailySeries } from '../series/daily-series.ts';
import { annualStep } from './annual-step.ts';
import { boundFindings } from './bound-findings.ts';
import { FINDING_KINDS, type Finding } from './finding.ts';
import { flatRuns } from './flat-runs.ts';
import { futureDates } from './future-dates.ts';
import { jumps } from './jumps.ts';
import { negativeFlows } from './negative-flows.ts';
import { repeatedBlocks } from './repeated-blocks.ts';
import { suspectStretches } from './suspect-stretches.ts';
import { tooLargeFlows } from './too-large-flows.ts';
import { unitChanges } from './unit-change.ts';

/** What a record is checked against beside itself. */
export interface CheckTerms {
  /** drainage area, km²; null where nobody knows */
  areaKm2: number | null;
  /** day number of the day of checking */
  today: number;
}

/** What the checks found on a record. */
export interface RecordCheck {
  /** by first day, then in the order of FINDING_KINDS; of a kind at most as many as boundFindings leaves */
  findings: Finding[];
  /** first and last day of every suspect stretch, one after the other: day numbers, rising and apart. All of them, also
   *  where the findings were too many to be listed one by one */
  suspect: number[];
}

/** Runs all checks on a record of daily flows. Looks at the values alone, whatever their flags and whatever a person said
 *  of them, so that a finding stays for as long as its values do. The series is left as it is.
 *  @param series  m³/s, NaN where missing
 *  @throws RangeError when `today` is no whole number */
export function checkRecord(series: DailySeries, { areaKm2, today }: CheckTerms): RecordCheck {
  if (!Number.isInteger(today)) throw new RangeError(`checkRecord: today must be a whole day number, got ${today}`);
  const found = [
    ...negativeFlows(series),
    ...repeatedBlocks(series),
    ...jumps(series),
    ...flatRuns(series),
    ...annualStep(series),
    ...unitChanges(series),
    ...futureDates(series, today),
    ...tooLargeFlows(series, areaKm2),
  ];
  found.sort(inOrder);
  return { findings: boundFindings(found).sort(inOrder), suspect: suspectStretches(found) };
}

const inOrder = (a: Finding, b: Finding): number =>
  a.firstDay - b.firstDay || FINDING_KINDS.indexOf(a.kind) - FINDING_KINDS.indexOf(b.kind);
