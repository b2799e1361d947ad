import { area, count, percent, type Units } from '@/app/components/format';
import { fold } from '../../row-filter.ts';
import type { Sort, Sorted } from './sort-stations.ts';

/** The figure by which a row is sorted, in words; '' where there is none. */
export function sortFigure({ station, span }: Sorted, sort: Sort, units: Units): string {
  switch (sort) {
    case 'area':
      return station.areaKm2 === null ? 'no area' : area(station.areaKm2, units);
    case 'length':
      return span.years > 0 ? count(span.years, 'year') : 'no values';
    case 'end':
      return span.last === null ? 'no values' : `to ${span.last}`;
    case 'complete':
      return span.complete === null ? 'no values' : percent(span.complete);
    case 'code':
      return station.code;
    default:
      // most stations are named after their river: once is enough
      return fold(station.name).includes(fold(station.river)) ? '' : station.river;
  }
}
