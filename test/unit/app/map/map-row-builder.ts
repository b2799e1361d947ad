import type { MapRow } from '@/app/regions/[region]/map-row';

/** A row of the map screen with nothing known but what a test gives. */
export const mapRow = (given: Partial<MapRow>): MapRow => ({
  code: '1',
  name: 'Station',
  river: '',
  latitude: null,
  longitude: null,
  areaKm2: null,
  rank: null,
  drying: false,
  yearsUsed: 0,
  zeroFlowYears: 0,
  trend: null,
  percentPerDecade: null,
  tau: null,
  zeroDaysPerDecade: null,
  pAdjusted: null,
  figure: { value: null, low: null, high: null },
  line: null,
  sparkFirst: 0,
  spark: '',
  unrankedReason: null,
  note: '',
  steadiness: null,
  ...given,
});
