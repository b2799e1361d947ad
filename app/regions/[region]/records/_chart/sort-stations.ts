import type { StationYears } from '@/lib/jobs/records-types';
import { fold } from '../../row-filter.ts';

export const SORTS = ['river', 'area', 'length', 'end', 'complete', 'code', 'name'] as const;
export type Sort = (typeof SORTS)[number];

/** What a station's record amounts to, for sorting and for the table. */
export interface RecordSpan {
  /** first and last low-flow year with a value; null without one */
  first: number | null;
  last: number | null;
  /** years with a value, and years that count */
  years: number;
  counting: number;
  /** years that count, as a share of the years from first to last; null without a value */
  complete: number | null;
}

export function spanOf({ firstYear, values, usable }: StationYears): RecordSpan {
  const from = values.findIndex((days) => days > 0);
  if (firstYear === null || from < 0) return { first: null, last: null, years: 0, counting: 0, complete: null };
  const to = values.findLastIndex((days) => days > 0);
  const counting = usable.reduce((sum, one) => sum + one, 0);
  return {
    first: firstYear + from,
    last: firstYear + to,
    years: values.filter((days) => days > 0).length,
    counting,
    complete: counting / (to - from + 1),
  };
}

export interface Sorted {
  station: StationYears;
  span: RecordSpan;
}

type Key = (row: Sorted) => string | number | null;

/** Keys by which a sort orders, the first that differs deciding; numbers largest first, words from A. */
const KEYS: Record<Sort, readonly Key[]> = {
  river: [({ station }) => fold(station.river) || null, ({ station }) => station.areaKm2],
  area: [({ station }) => station.areaKm2],
  length: [({ span }) => span.years || null, ({ span }) => span.counting],
  end: [({ span }) => span.last, ({ span }) => span.years],
  complete: [({ span }) => span.complete, ({ span }) => span.counting],
  code: [({ station }) => station.code],
  name: [({ station }) => fold(station.name)],
};

/** Stations that answer the search, in order. Those without the sort's figure stand last, also in reverse; equal ones by
 *  code. The list given is left as it is.
 *  @param search  every word must stand in code, name or river, marks and capitals aside */
export function sortStations(
  stations: readonly StationYears[],
  { sort, reverse, search }: { sort: Sort; reverse: boolean; search: string },
): Sorted[] {
  const words = fold(search).split(/\s+/).filter(Boolean);
  const found = stations.filter(({ code, name, river }) => {
    const text = fold(`${code} ${name} ${river}`);
    return words.every((word) => text.includes(word));
  });
  const rows = found.map((station) => ({ station, span: spanOf(station) }));
  const turn = reverse ? -1 : 1;
  return rows.sort((a, b) => {
    for (const key of KEYS[sort]) {
      const order = compare(key(a), key(b), turn);
      if (order !== 0) return order;
    }
    return byCode(a.station.code, b.station.code);
  });
}

function compare(a: string | number | null, b: string | number | null, turn: number): number {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  if (typeof a === 'string' || typeof b === 'string') return turn * byCode(String(a), String(b));
  return turn * (b - a);
}

/** Numbers inside codes count as numbers: K2 stands before K10. */
const collator = new Intl.Collator('en', { numeric: true });
const byCode = (a: string, b: string): number => collator.compare(a, b) || (a < b ? -1 : a > b ? 1 : 0);
