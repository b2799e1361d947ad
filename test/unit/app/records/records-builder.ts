import { DEFAULT_BASIS } from '@/lib/basis';
import type { CommonPeriods, FindingRow, RegionRecords, StationYears } from '@/lib/jobs/records-types';

const basis = { ...DEFAULT_BASIS, period: null, yearStart: 4, asked: { period: 'common', yearStart: 'auto' } } as const;

/** A station whose years have so many days with a value; those of 360 and more count. */
export function stationOf(code: string, values: number[], more: Partial<StationYears> = {}): StationYears {
  return {
    code,
    name: `Gauge ${code}`,
    river: '',
    areaKm2: null,
    influence: 'unknown',
    changes: [],
    quantities: ['flow'],
    first: values.length > 0 ? '2000-04-01' : null,
    last: values.length > 0 ? `${2000 + values.length}-03-31` : null,
    valueCount: values.reduce((sum, days) => sum + days, 0),
    firstYear: values.length > 0 ? 2000 : null,
    values,
    missing: values.map((days) => 365 - days),
    flagged: {},
    usable: values.map((days) => (days >= 360 ? 1 : 0)),
    reason: values.map((days) => (days >= 360 ? -1 : 0)),
    ...more,
  };
}

export function recordsOf(stations: StationYears[]): RegionRecords {
  return {
    basis: { ...basis, exclude: ['provisional'] },
    firstYear: 2000,
    lastYear: 2003,
    yearDays: [365, 365, 365, 366],
    reasons: ['30 days missing'],
    stations,
  };
}

/** @param counts  "first-last" → stations; all other periods keep none */
export function periodsOf(
  counts: Record<string, number>,
  { firstYear = 2000, lastYear = 2004, minYears = 3 } = {},
): CommonPeriods {
  const years = lastYear - firstYear + 1;
  const ranked = new Array<number>(years * years).fill(0);
  for (const [period, stations] of Object.entries(counts)) {
    const [first, last] = period.split('-').map(Number);
    ranked[(first - firstYear) * years + last - firstYear] = stations;
  }
  return {
    basis: { ...basis, exclude: ['provisional'], minYears },
    stations: 9,
    firstYear,
    lastYear,
    ranked,
    complete: ranked,
    common: null,
  };
}

export function findingOf(more: Partial<FindingRow>): FindingRow {
  return {
    id: 'jump:2001-05-01',
    code: 'A',
    quantity: 'flow',
    kind: 'jump',
    first: '2001-05-01',
    last: '2001-05-01',
    days: 1,
    detail: {},
    state: 'open',
    ...more,
  };
}
