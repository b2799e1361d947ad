import { DEFAULT_BASIS, type ResolvedBasis } from '../../../lib/basis.ts';
import type { RankingRow } from '../../../lib/region/ranking-types.ts';
import { rankedRow } from '../region/region-fixtures.ts';

/** A ranked station with a figure in every field. */
export const RANKED: RankingRow = rankedRow({
  id: 1,
  code: '007',
  name: 'Alder, at the "mill"',
  river: 'Wethe',
  latitude: 50.25,
  longitude: -7.5,
  areaKm2: 120,
  influence: 'natural',
  yearsUsed: 30,
  firstYear: 1990,
  lastYear: 2019,
  meanMinimum: 1 / 3,
  meanMinimumSpecific: 2.7777777777777777,
  slopePerDecade: -0.0123456789123,
  slopeLow: -0.02,
  slopeHigh: 0.1 + 0.2,
  percentPerDecade: -3.7037036737,
  specificPerDecade: -0.1,
  tau: -0.25,
  z: -1.96,
  p: 0.05,
  pAdjusted: 0.09,
  r1: 0.1,
  serialFactor: 1.2,
  intercept: 5,
  years: [1990, 2019],
  minima: [0.4, 0.3],
});

/** A station without a place on the map or in the ranking. */
export const UNRANKED: RankingRow = {
  ...RANKED,
  id: 2,
  code: 'B 2',
  name: 'Birch',
  latitude: null,
  longitude: null,
  areaKm2: null,
  influence: 'spring-fed',
  rank: null,
  yearsUsed: 3,
  meanMinimumSpecific: null,
  slopePerDecade: null,
  slopeLow: null,
  slopeHigh: null,
  percentPerDecade: null,
  tau: null,
  z: null,
  p: null,
  pAdjusted: null,
  trend: null,
  trendOf: null,
  unrankedReason: '3 usable years, 20 needed',
  note: 'short',
};

export const RESOLVED: ResolvedBasis = {
  ...DEFAULT_BASIS,
  period: [1990, 2019],
  yearStart: 4,
  asked: { period: 'common', yearStart: 'auto' },
};
