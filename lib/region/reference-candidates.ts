import { rankCorrelation } from '../statistics/rank-correlation.ts';
import { distanceKm } from './neighbours.ts';
import { orNull } from './or-null.ts';
import type { ReferenceCandidate } from './pair-types.ts';
import { byCode } from './places.ts';
import type { RankingRow } from './ranking-types.ts';

/** A reference shares at least so many usable years with the station, and at least half of those that the station has. */
const FEWEST_COMMON_YEARS = 10;
const LEAST_SHARE = 0.5;

/** What is begun with shares more: the years of a comparison are those that all its stations have. */
const SHARE_TO_BEGIN_WITH = 0.8;

/** So many natural stations stand for the weather until a person chooses. */
const REFERENCES_TO_BEGIN_WITH = 3;

/** So many of the nearest natural stations are looked at: further ones have other weather. */
const NEAREST = 30;

type Row = Pick<
  RankingRow,
  'code' | 'name' | 'latitude' | 'longitude' | 'influence' | 'derivedFrom' | 'drying' | 'years' | 'values'
>;

/** Natural stations that may serve as reference for one: of the nearest 30 that share at least 10 usable years and half of its own with
 *  it, those whose annual figures go most with its own first (rank correlation), equal ones by distance and code. Derived
 *  records are passed over, for they may hold the station's own water, and so are stations under Drying.
 *
 *  Choosing by correlation uses no trend, but a reference that fell as the station did correlates too: look at its own
 *  trend.
 *  @param rows  of the ranking, in any order
 *  @returns     none when no row has the code */
export function referenceCandidates(code: string, rows: readonly Row[]): ReferenceCandidate[] {
  const here = rows.find((row) => row.code === code);
  if (!here) return [];
  const own = new Map(here.years.map((year, i) => [year, here.values[i]]));
  const far = (km: number | null) => km ?? Number.POSITIVE_INFINITY;
  return rows
    .filter((row) => row.code !== code && row.influence === 'natural' && row.derivedFrom === undefined && !row.drying)
    .map((row) => ({ row, km: distanceKm(here, row), common: row.years.filter((year) => own.has(year)).length }))
    .filter(({ common }) => common >= FEWEST_COMMON_YEARS && common >= LEAST_SHARE * here.years.length)
    .sort((a, b) => comparing(far(a.km), far(b.km)) || byCode(a.row.code, b.row.code))
    .slice(0, NEAREST)
    .map(({ row, km, common }) => ({
      ...{ code: row.code, name: row.name, km, commonYears: common },
      correlation: orNull(
        rankCorrelation(
          row.years.map((year) => own.get(year) ?? Number.NaN),
          row.values,
        ),
      ),
    }))
    .sort((a, b) => comparing(b.correlation ?? -2, a.correlation ?? -2));
}

/** What is compared with until a person chooses: the three that go most with the station and share four fifths of its
 *  usable years, else the one that shares most.
 *  @param candidates  as from referenceCandidates
 *  @param years       usable years that the station has */
export function referencesToBeginWith(candidates: readonly ReferenceCandidate[], years: number): string[] {
  const enough = candidates.filter(({ commonYears }) => commonYears >= SHARE_TO_BEGIN_WITH * years);
  const longest = [...candidates].sort((a, b) => b.commonYears - a.commonYears).slice(0, 1);
  return (enough.length > 0 ? enough.slice(0, REFERENCES_TO_BEGIN_WITH) : longest).map(({ code }) => code);
}

/** Also of two infinities, whose difference is no number. */
const comparing = (a: number, b: number): number => (a === b ? 0 : a - b);
