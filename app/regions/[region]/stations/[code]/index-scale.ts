import { tickText } from '@/app/components/duration-figure/figure-text';
import { flowIn, MISSING, significant, UNIT_WORDS, type Units } from '@/app/components/format';
import type { AnnualIndexName } from '@/lib/basis';
import { DAY_SECONDS, dateOfDay, dayNumber } from '@/lib/calendar/day';
import { INDEX_FACTS } from '@/lib/region/index-facts';

/** How the annual figures of an index are shown. */
export interface IndexScale {
  index: AnnualIndexName;
  /** from the stored unit to the one shown; empty for a number without unit and for dates */
  factor: number;
  unit: string;
  /** over the axis. Example: "Lowest 7-day mean of each year, m³/s" */
  axisName: string;
  /** said of a year that has none */
  none: string;
}

const MILLION = 1e6;

/** The scale of an index in the units shown. Volumes are told in millions of cubic metres, or of cubic feet. */
export function indexScale(index: AnnualIndexName, days: number, units: Units): IndexScale {
  const flowFactor = flowIn(1, units) ?? 1;
  const { isFlow, unit } = INDEX_FACTS[index];
  const shown = isFlow
    ? { factor: flowFactor, unit: UNIT_WORDS[units].flow }
    : index === 'deficit'
      ? { factor: flowFactor / MILLION, unit: units === 'us' ? 'million ft³' : 'million m³' }
      : { factor: 1, unit: index === 'minimum-date' ? '' : unit };
  const name = AXIS_NAMES[index](days);
  return {
    index,
    ...shown,
    // days of zero flow are named already
    axisName: shown.unit && shown.unit !== 'days' ? `${name}, ${shown.unit}` : name,
    none: index === 'minimum' ? 'no minimum' : 'no figure used',
  };
}

const AXIS_NAMES: Record<AnnualIndexName, (days: number) => string> = {
  minimum: (days) => `Lowest ${days}-day mean of each year`,
  q95: () => 'Q95 of each year',
  'mean-flow': () => 'Mean flow of each year',
  'zero-flow-days': () => 'Zero-flow days of each year',
  bfi: () => 'Baseflow index of each year',
  'minimum-date': (days) => `Date of the lowest ${days}-day mean of each year`,
  deficit: () => 'Volume below the record’s Q90 in each year',
};

/** A year's figure with its unit; dates as day and month. Example: "0.250 m³/s", "5 September" */
export function valueText(value: number | null, scale: IndexScale): string {
  if (value === null) return scale.none;
  if (scale.index === 'minimum-date') return dateText(value);
  return `${significant(value * scale.factor)} ${scale.unit}`.trim();
}

/** A change per decade in the unit shown, with its sign. Dates change by days. */
export function changeText(value: number | null, scale: IndexScale): string {
  if (value === null) return MISSING;
  const written = significant(value * scale.factor).replace(/^-/, '−');
  return value > 0 ? `+${written}` : written;
}

/** Unit of a change, before "per decade"; empty for a number without unit. */
export const changeUnit = ({ index, unit }: IndexScale): string => (index === 'minimum-date' ? 'days' : unit);

// by a formatter, for the names of months stand beside the whole schema, which no figure should load
const DAY_AND_MONTH = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', timeZone: 'UTC' });
const SHORTLY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' });

/** A day on the line of unrolled dates as day and month; below 1 is the year before, above 365 the year after.
 *  Example: −5 → "26 December" */
export function dateText(value: number): string {
  return DAY_AND_MONTH.format(ordinaryDay(value) * DAY_SECONDS * 1000);
}

/** Marks of an axis of dates: firsts of months, at most seven. */
export function dateTicks(low: number, high: number): { value: number; text: string }[] {
  const firsts: { value: number; text: string }[] = [];
  for (let value = Math.ceil(low); value <= high; value++) {
    const day = ordinaryDay(value);
    if (dateOfDay(day).day === 1) firsts.push({ value, text: SHORTLY.format(day * DAY_SECONDS * 1000) });
  }
  const step = Math.ceil(firsts.length / 7);
  return firsts.filter((_, i) => i % step === 0);
}

/** Day number, in a year of 365 days, of a day of the year that may lie in the one before or after. */
const ordinaryDay = (value: number): number => dayNumber(2001, 1, 1) + ((((Math.round(value) - 1) % 365) + 365) % 365);

/** Marks of an axis in the unit shown. */
export function axisTicks(y: { ticks(count: number): number[]; domain(): number[] }, scale: IndexScale) {
  if (scale.index === 'minimum-date') return dateTicks(y.domain()[0], y.domain()[1]);
  return y.ticks(5).map((value) => ({ value, text: tickText(value) }));
}
