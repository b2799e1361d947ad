/** How numbers, ranges and units are written on every screen. A missing figure is an en dash, never a zero. */
import type { Basis } from '@/lib/basis';

export const MISSING = '–';
const MINUS = '\u2212';
const NO_BREAK = '\u00a0';
const THIN = '\u202f';

type Figure = number | null | undefined;
const isMissing = (value: Figure): value is null | undefined =>
  value === null || value === undefined || !Number.isFinite(value);

/** Fixed decimals, thousands parted by commas, a true minus sign; −0.0 is written 0.0.
 *  Example: (-1234.56, 1) → "−1,234.6" */
export function fixed(value: Figure, decimals = 0): string {
  if (isMissing(value)) return MISSING;
  const [whole, fraction] = Math.abs(value).toFixed(decimals).split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ',');
  const text = fraction === undefined ? grouped : `${grouped}.${fraction}`;
  return value < 0 && /[1-9]/.test(text) ? MINUS + text : text;
}

/** As `fixed`, with a plus sign before what is above zero. */
export function signed(value: Figure, decimals = 1): string {
  const text = fixed(value, decimals);
  return !isMissing(value) && value > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

/** Three significant figures (or as asked) without an exponent in the range of river flows.
 *  Example: 0.012345 → "0.0123", 1234.5 → "1,230", 0 → "0" */
export function significant(value: Figure, figures = 3): string {
  if (isMissing(value)) return MISSING;
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(figures));
  const magnitude = Math.floor(Math.log10(Math.abs(rounded)));
  if (magnitude < -6) return value.toExponential(figures - 1).replaceAll('-', MINUS);
  return fixed(rounded, Math.max(0, figures - 1 - magnitude));
}

/** Two ends with an en dash; with "to" where an end is negative, so that dash and minus never meet.
 *  Example: (1985, 2024) → "1985–2024", ("−9.1", "−2.8") → "−9.1 to −2.8" */
export function range(from: string | number, to: string | number): string {
  const [low, high] = [String(from), String(to)];
  return low.startsWith(MINUS) || high.startsWith(MINUS) || low.startsWith('+')
    ? `${low} to ${high}`
    : `${low}\u2013${high}`;
}

/** An interval of signed figures; a dash when an end is missing. */
export function interval(low: Figure, high: Figure, decimals = 1): string {
  return isMissing(low) || isMissing(high) ? MISSING : range(signed(low, decimals), signed(high, decimals));
}

/** A p-value as "0.034" or "< 0.001". */
export function pValue(p: Figure): string {
  if (isMissing(p)) return MISSING;
  if (p < 0.001) return `<${NO_BREAK}0.001`;
  return p.toFixed(p < 0.1 ? 3 : 2);
}

/** A share as percent with a space before the sign: 0.1 → "10 %". */
export function percent(share: Figure, decimals = 0): string {
  if (isMissing(share)) return MISSING;
  return `${fixed(share * 100, decimals)}${NO_BREAK}%`;
}

/** A share of many cases as percent, where some are not none and most are not all: 0.004 → "< 1 %", 0.998 → "> 99 %". */
export function shareText(share: Figure): string {
  if (isMissing(share)) return MISSING;
  if (share > 0 && share < 0.01) return `<${NO_BREAK}${percent(0.01)}`;
  if (share < 1 && share > 0.99) return `>${NO_BREAK}${percent(0.99)}`;
  return percent(share);
}

/** "1 station", "12 stations". */
export function count(number: number, singular: string, plural = `${singular}s`): string {
  return `${fixed(number)} ${number === 1 ? singular : plural}`;
}

export type Units = Basis['units'];

/** Factors from the stored metric unit to what is shown. Exact by definition of foot (0.3048 m) and mile (1,609.344 m). */
const FT3_PER_M3 = 1 / 0.3048 ** 3;
const MI2_PER_KM2 = 1 / 1.609344 ** 2;
const FT3S_MI2_PER_LS_KM2 = FT3_PER_M3 / 1000 / MI2_PER_KM2;

export const UNIT_WORDS = {
  metric: { flow: 'm³/s', area: 'km²', specific: 'L/s/km²' },
  us: { flow: 'ft³/s', area: 'mi²', specific: 'ft³/s/mi²' },
} as const;

export const flowIn = (m3s: Figure, units: Units): Figure =>
  isMissing(m3s) || units === 'metric' ? m3s : m3s * FT3_PER_M3;
const areaIn = (km2: Figure, units: Units): Figure => (isMissing(km2) || units === 'metric' ? km2 : km2 * MI2_PER_KM2);
export const specificIn = (lsKm2: Figure, units: Units): Figure =>
  isMissing(lsKm2) || units === 'metric' ? lsKm2 : lsKm2 * FT3S_MI2_PER_LS_KM2;

/** Example: (0.4123, 'metric') → "0.412 m³/s" */
export function flow(m3s: Figure, units: Units): string {
  return isMissing(m3s) ? MISSING : `${significant(flowIn(m3s, units))}${NO_BREAK}${UNIT_WORDS[units].flow}`;
}

export function specific(lsKm2: Figure, units: Units): string {
  return isMissing(lsKm2)
    ? MISSING
    : `${significant(specificIn(lsKm2, units))}${NO_BREAK}${UNIT_WORDS[units].specific}`;
}

/** Whole numbers from 100 on, three significant figures below. */
export function areaNumber(km2: Figure, units: Units): string {
  const shown = areaIn(km2, units);
  if (isMissing(shown)) return MISSING;
  return shown >= 100 ? fixed(shown) : significant(shown);
}

export function area(km2: Figure, units: Units): string {
  return isMissing(km2) ? MISSING : `${areaNumber(km2, units)}${NO_BREAK}${UNIT_WORDS[units].area}`;
}

/** 5.5 → "5.5 %/decade" with the sign always shown. */
export function percentPerDecade(value: Figure): string {
  return isMissing(value) ? MISSING : `${signed(value, 1)}${THIN}% per decade`;
}
