import { FLOW_UNITS, type FlowUnit } from '../series/flow-units.ts';

export { toM3s } from '../series/flow-units.ts';

/** Heading of a column of a public daily-values service: discharge (parameter 00060) in ft³/s, daily mean (statistic
 *  00003). */
export const DAILY_DISCHARGE = /_00060_00003$/;

/** How files write the units, after `plain` below has taken case, underscores and raised digits out. What stands per
 *  area (L/s/km²) is another quantity. */
const PER_SECOND = String.raw`(?:\/ ?s(?:ec(?:ond)?)?|[. ]?s(?:ec)?\^?-1| per sec(?:ond)?)`;
const PER_DAY = String.raw`(?:\/ ?d(?:ay)?|[. ]?d(?:ay)?\^?-1| per day)`;
const NOT_PER_AREA = '(?![a-z0-9]|[ ./]{0,2}(?:km|mi|ha)[0-9]?)';
const CUBIC_FOOT = String.raw`(?:ft\^?3|cubic (?:feet|foot)|cu\.? ?(?:ft|feet)\.?|\[cft i\]|\[ft i\]3)`;
const PATTERNS: Record<FlowUnit, RegExp> = {
  'm3/s': pattern(
    `m\\^?3${PER_SECOND}|m3 ?s|cumecs?|cms|cubic met(?:er|re)s?${PER_SECOND}|cu\\.? ?m(?:et(?:er|re)s?)?${PER_SECOND}`,
  ),
  'L/s': pattern(`l${PER_SECOND}|l s|lps|lit(?:er|re)s?${PER_SECOND}`),
  'ft3/s': pattern(`${CUBIC_FOOT}${PER_SECOND}|ft3 ?s|cfs|cusecs?`),
  'ML/d': pattern(
    `ml${PER_DAY}|ml d|mld|megalit(?:er|re)s?(?:${PER_DAY})?|\\(ml\\)|10\\^?[36][. ]?(?:m\\^?3|l)${PER_DAY}`,
  ),
  'Mgal/d': pattern(
    `mgd|mgal(?:lons?)?(?: ?\\(us\\)| us)?${PER_DAY}|mgal d|million (?:us )?gal(?:lon)?s?(?: ?\\(us\\))?${PER_DAY}|10[.^]6\\.\\[gal us\\]${PER_DAY}`,
  ),
  'acre-ft/d': pattern(`ac(?:re)?s?[-. ]?(?:ft|feet|foot)\\.?${PER_DAY}|ac(?:re)?[- .]?ft d|af${PER_DAY}|afd`),
  'mm/d': pattern(`mm${PER_DAY}|mm d|mmd|millimet(?:er|re)s?${PER_DAY}`),
};

/** A gallon that is none of the United States'. */
const OTHER_GALLON = /imp(?:erial)?\b|\buk\b|\bbritish\b/;

function pattern(alternatives: string): RegExp {
  return new RegExp(`(?<![a-z0-9])(?:${alternatives})${NOT_PER_AREA}`);
}

function plain(text: string): string {
  return text
    .replace(/³/g, '3')
    .replace(/⁻¹/g, '-1')
    .replace(/[−–]/g, '-')
    .replace(/[·⋅*]/g, '.')
    .replaceAll('_', ' ')
    .toLowerCase();
}

/** The flow units that a text names, in a heading ("flow_cfs", "Abfluss [m³/s]") or in a sentence. */
export function unitsNamedIn(text: string): FlowUnit[] {
  const words = plain(text);
  return FLOW_UNITS.filter((unit) => PATTERNS[unit].test(words) && !(unit === 'Mgal/d' && OTHER_GALLON.test(words)));
}

/** The unit that a text names, null when it names none or several. */
export function unitNamedIn(text: string): FlowUnit | null {
  const units = unitsNamedIn(text);
  return units.length === 1 ? units[0] : null;
}
