import { FLOW_UNITS, type FlowUnit, toM3s } from './flow-units.ts';

/** What a daily record may be of. Analyses read flow; the others are stored beside it and shown. */
export const QUANTITIES = ['flow', 'stage', 'rainfall', 'potential-evaporation'] as const;
export type Quantity = (typeof QUANTITIES)[number];

/** A quantity as a text names it. Example: 'potential-evaporation' → 'potential evaporation' */
export const quantityWords = (quantity: Quantity): string => quantity.replace('-', ' ');

/** Units of the quantities beside flow: levels, and depths of a day. */
const STAGE_UNITS = ['m', 'cm', 'mm', 'ft'] as const;
const DEPTH_UNITS = ['mm', 'in'] as const;
type StageUnit = (typeof STAGE_UNITS)[number];
type DepthUnit = (typeof DEPTH_UNITS)[number];
export type Unit = FlowUnit | StageUnit | DepthUnit;

/** The units that each quantity may come in, the one it is shown in first. */
export const UNITS_OF: Record<Quantity, readonly Unit[]> = {
  flow: FLOW_UNITS,
  stage: STAGE_UNITS,
  rainfall: DEPTH_UNITS,
  'potential-evaporation': DEPTH_UNITS,
};

/** Every unit of every quantity. */
export const UNITS: readonly Unit[] = [...new Set(Object.values(UNITS_OF).flat())];

/** Metres in one unit of length, exact (NIST SP 811, 2008). */
const METRES: Record<StageUnit | DepthUnit, number> = { m: 1, cm: 0.01, mm: 0.001, ft: 0.3048, in: 0.0254 };

/** Factor from a unit to the one its quantity is shown in: m³/s for flow, m for stage, mm for depths of a day.
 *  @param areaKm2  drainage area, km²; only a flow in mm/d needs one
 *  @returns        NaN for a flow in mm/d without a positive area
 *  @throws RangeError for a unit that the quantity does not come in
 *  Example: toShownUnit('stage', 'ft', null) → 0.3048 */
export function toShownUnit(quantity: Quantity, unit: Unit, areaKm2: number | null): number {
  if (!UNITS_OF[quantity].includes(unit)) {
    throw new RangeError(
      `toShownUnit: unit of ${quantity} must be one of ${UNITS_OF[quantity].join(', ')}, got ${unit}`,
    );
  }
  if (quantity === 'flow') return toM3s(unit as FlowUnit, areaKm2);
  const metres = METRES[unit as StageUnit | DepthUnit];
  return quantity === 'stage' ? metres : metres / METRES.mm;
}
