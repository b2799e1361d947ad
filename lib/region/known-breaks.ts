import { parseIsoDate } from '../calendar/day.ts';
import { lowFlowYearLabel, lowFlowYearOfDay } from '../calendar/low-flow-year.ts';
import type { StationChange } from '../series/station-history.ts';
import type { Break } from './break-types.ts';

/** Breaks of a station from its dated changes. A change falls into the low-flow year of its date, and the first year after
 *  it is the next one, or this one where the date is its first day; changes before one year are one break.
 *  @param yearStart  first month of the low-flow year, 1–12
 *  @returns          years rising
 *  Example: a dam of 1968-05-01, April years → the first year after is 1969/70 */
export function breaksOfChanges(changes: readonly StationChange[], yearStart: number): Break[] {
  const byYear = new Map<number, StationChange[]>();
  for (const change of [...changes].sort((a, b) => (a.date < b.date ? -1 : 1))) {
    const year = lowFlowYearOfDay(parseIsoDate(change.date) - 1, yearStart) + 1;
    byYear.set(year, [...(byYear.get(year) ?? []), change]);
  }
  return [...byYear].map(([year, all]) => ({
    year,
    from: 'change',
    words: all.map(changeWords).join('; '),
    label: [...new Set(all.map(({ kind }) => kind))].sort().join(' and '),
  }));
}

const changeWords = ({ kind, date, note }: StationChange): string =>
  `${kind}, ${date}${note === '' ? '' : `: ${note}`}`;

/** Breaks that a person chose, by the first low-flow year after each.
 *  @returns years rising, each once */
export function chosenBreaks(years: readonly number[], yearStart: number): Break[] {
  return [...new Set(years)]
    .sort((a, b) => a - b)
    .map((year) => {
      const label = `from ${lowFlowYearLabel(year, yearStart)} on`;
      return { year, from: 'chosen', words: `chosen: ${label}`, label };
    });
}

/** Breaks of both kinds in one list; where both name a year the dated change stands, for it says why. */
export function joinBreaks(changes: readonly Break[], chosen: readonly Break[]): Break[] {
  const known = new Set(changes.map(({ year }) => year));
  return [...changes, ...chosen.filter(({ year }) => !known.has(year))].sort((a, b) => a.year - b.year);
}
