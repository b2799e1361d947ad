import { toM3s } from '@/lib/series/flow-units';
import type { NamedFlow } from '@/lib/series/station-history';

/** A named flow as a level of a figure. */
export interface NamedLevel {
  name: string;
  /** m³/s */
  flow: number;
  /** name, and the months in which it holds */
  label: string;
}

export const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** Months in words, runs of them joined, over the turn of the year too. Example: [5, 6, 7, 11] → "May–Jul, Nov" */
export function monthsText(months: readonly number[] | null): string {
  if (months === null || months.length === 12) return 'all year';
  const held = new Set(months);
  const before = (month: number) => (month === 1 ? 12 : month - 1);
  const after = (month: number) => (month === 12 ? 1 : month + 1);
  return [...held]
    .sort((a, b) => a - b)
    .filter((month) => !held.has(before(month)))
    .map((first) => {
      let last = first;
      while (held.has(after(last))) last = after(last);
      const [from, to] = [MONTHS[first - 1], MONTHS[last - 1]];
      return from === to ? from : `${from}–${to}`;
    })
    .join(', ');
}

/** Named flows in m³/s. One in mm/d at a station without a drainage area has no such value and is passed over. */
export function namedLevels(flows: readonly NamedFlow[], areaKm2: number | null): NamedLevel[] {
  return flows.flatMap(({ name, value, unit, months }) => {
    const flow = value * toM3s(unit, areaKm2);
    if (Number.isNaN(flow)) return [];
    return [{ name, flow, label: months === null ? name : `${name}, ${monthsText(months)}` }];
  });
}

/** A named flow in words, as it was given. Example: "500 L/s, May–Oct (abstraction stop)" */
export function namedFlowText({ kind, value, unit, months }: NamedFlow): string {
  const when = months === null ? '' : `, ${monthsText(months)}`;
  return `${Number(value.toPrecision(6))} ${unit.replace('m3', 'm³').replace('ft3', 'ft³')}${when} (${kind})`;
}
