import { indexWords, type ResolvedBasis } from '../basis.ts';
import { benjaminiHochberg } from '../statistics/false-discovery.ts';
import type { Break, StationBreaks, StepTest } from './break-types.ts';
import { INDEX_FACTS } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';
import { rowSerialTerms } from './row-serial-terms.ts';
import { partOf, stepTest } from './step-test.ts';

export type BreaksRow = Pick<
  RankingRow,
  'code' | 'name' | 'years' | 'values' | 'trendOf' | 'r1' | 'serialFactor' | 'unrankedReason'
>;

/** Levels of one station between breaks that were known or chosen beforehand, each against the one before, over the usable
 *  years of the period. Serial correction: the whole period's lag-1 correlation with the factor for the years of both
 *  parts, also under `pre-whitened`, for whitening would smear the step; `all-lags` and `block-bootstrap` keep the whole
 *  period's factor. p is adjusted over the station's own steps. What the data suggest is added by the caller.
 *  @param breaks  years rising, each once
 *  @throws RangeError when a value is infinite */
export function stationBreaks(row: BreaksRow, basis: ResolvedBasis, breaks: readonly Break[]): StationBreaks {
  const { years, values, trendOf } = row;
  const n = years.length;
  const ofDays = trendOf === 'zero-days';
  const head = {
    code: row.code,
    name: row.name,
    tested: ofDays ? indexWords({ ...basis, index: 'zero-flow-days' }) : indexWords(basis),
    unit: ofDays ? 'days' : INDEX_FACTS[basis.index].unit,
    suggested: null,
  };
  if (n === 0) {
    return { ...head, segments: [], steps: [], leftOut: [], problem: row.unrankedReason ?? 'no usable year' };
  }
  const [first, last] = basis.period ?? [years[0], years[n - 1]];
  const leftOut: StationBreaks['leftOut'] = [];
  const inside: Break[] = [];
  for (const each of breaks) {
    if (years[0] >= each.year) leftOut.push({ break: each, reason: `no usable year before it in ${first}–${last}` });
    else if (years[n - 1] < each.year) {
      leftOut.push({ break: each, reason: `no usable year from it on in ${first}–${last}` });
    } else inside.push(each);
  }
  const edges = [first, ...inside.map(({ year }) => year), last + 1];
  const parts = edges.slice(1).map((edge, i) => partOf(years, values, [edges[i], edge - 1]));
  const options = { terms: rowSerialTerms(row, basis.serialCorrection), percentOf: ofDays ? null : basis.index };
  const steps = inside.map((each, i) => stepTest(each, parts[i], parts[i + 1], options));
  return { ...head, segments: parts.map(({ segment }) => segment), steps: adjusted(steps), leftOut, problem: null };
}

/** Steps with p adjusted over all of them that were tested.
 *  Source: see `benjaminiHochberg`. */
export function adjusted(steps: readonly StepTest[]): StepTest[] {
  const p = benjaminiHochberg(steps.map((step) => step.p ?? Number.NaN));
  return steps.map((step, i) => ({ ...step, pAdjusted: step.p === null ? null : p[i] }));
}
