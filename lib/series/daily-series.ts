/** A station's daily mean flows on consecutive days. NaN is missing; there is no other sentinel. */
export interface DailySeries {
  /** day number of `values[0]`: days since 1970-01-01, proleptic Gregorian */
  firstDay: number;
  /** daily mean flow, m³/s, NaN where missing */
  values: Float64Array;
  /** flag bits of each day, see FLAG; same length as `values` */
  flags: Uint8Array;
}

/** Flag bits of a day. Rejected days are always treated as missing; the others when the basis excludes them. */
export const FLAG = {
  estimated: 1,
  provisional: 2,
  ice: 4,
  'below-detection': 8,
  suspect: 16,
  rejected: 32,
} as const;
export type FlagName = keyof typeof FLAG;
export const FLAG_NAMES = Object.keys(FLAG) as FlagName[];

/** Flag bits by their names. */
export const bitsOfFlags = (names: readonly FlagName[]): number => names.reduce((bits, name) => bits | FLAG[name], 0);
