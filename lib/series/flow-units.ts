/** Units in which flows arrive. Mgal/d is million US gallons a day; mm/d is a depth over the drainage area. */
export const FLOW_UNITS = ['m3/s', 'L/s', 'ft3/s', 'ML/d', 'Mgal/d', 'acre-ft/d', 'mm/d'] as const;
export type FlowUnit = (typeof FLOW_UNITS)[number];

/** m³/s in one unit. Exact by definition (NIST SP 811, 2008): a foot is 0.3048 m, a US gallon 231 cubic inches of
 *  2.54 cm, a day 86,400 s. An acre-foot is taken as 43,560 cubic feet of the international foot; of the survey foot it
 *  would be larger by 6 parts in a million. */
const FACTORS: Record<Exclude<FlowUnit, 'mm/d'>, number> = {
  'm3/s': 1,
  'L/s': 0.001,
  'ft3/s': 0.028316846592,
  'ML/d': 1000 / 86400,
  'Mgal/d': 3785.411784 / 86400,
  'acre-ft/d': 1233.48183754752 / 86400,
};

/** Factor from a unit to m³/s.
 *  @param areaKm2  drainage area, km²; only mm/d, a depth over it, needs one
 *  @returns        NaN for mm/d without a positive area
 *  Example: toM3s('mm/d', 86.4) → 1 */
export function toM3s(unit: FlowUnit, areaKm2: number | null): number {
  if (!FLOW_UNITS.includes(unit))
    throw new RangeError(`toM3s: unit must be one of ${FLOW_UNITS.join(', ')}, got ${unit}`);
  if (unit !== 'mm/d') return FACTORS[unit];
  return areaKm2 !== null && areaKm2 > 0 ? areaKm2 / 86.4 : Number.NaN;
}
