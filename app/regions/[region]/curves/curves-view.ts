import { readCodes, writeCodes } from '@/app/components/codes-in-address';
import type { ExceedanceAxis, FlowAxis } from '@/app/components/duration-figure/axes';
import { flowIn, specificIn, UNIT_WORDS, type Units } from '@/app/components/format';
import type { CurveKind, RegionCurves } from '@/lib/jobs/types';

export const EXCEEDANCE_AXES: readonly ExceedanceAxis[] = ['linear', 'normal'];
export const FLOW_AXES: readonly FlowAxis[] = ['log', 'linear'];

/** 'steepest', 'view', 'all' or the codes of stations. */
export type StationChoice = { way: 'steepest' | 'view' | 'all' } | { way: 'codes'; codes: string[] };

/** How many stations are shown when nobody has chosen yet. */
export const FIRST_CHOICE = 6;

/** Example: "01,02" → codes 01 and 02; nothing → the steepest declines. Codes that hold a comma are written with %2C. */
export function readChoice(text: string | null): StationChoice {
  if (text === null) return { way: 'steepest' };
  if (text === 'view' || text === 'all') return { way: text };
  return { way: 'codes', codes: readCodes(text) };
}

/** The text for the address, or null for the choice that needs none. */
export function writeChoice(choice: StationChoice): string | null {
  if (choice.way === 'steepest') return null;
  if (choice.way !== 'codes') return choice.way;
  return writeCodes(choice.codes) || ',';
}

export const readKind = (text: string | null): CurveKind => (text === 'median-annual' ? 'median-annual' : 'period');

/** Name of the flow axis with its unit. */
export function flowName(unit: RegionCurves['unit'], by: string, units: Units): string {
  if (unit === '1') return `Flow as a ratio to the station’s own ${by} flow`;
  if (unit === 'm³/s') return `Flow, ${UNIT_WORDS[units].flow}`;
  return `Flow per unit of drainage area, ${UNIT_WORDS[units].specific}`;
}

export function unitName(unit: RegionCurves['unit'], by: string, units: Units): string {
  if (unit === '1') return `ratio to the ${by} flow`;
  return unit === 'm³/s' ? UNIT_WORDS[units].flow : UNIT_WORDS[units].specific;
}

/** A curve's flows in the unit shown, to five significant digits (what a screen can show), missing ones as null. */
export function shownFlows(flows: ArrayLike<number>, unit: RegionCurves['unit'], units: Units): (number | null)[] {
  return Array.from(flows, (flow) => {
    const shown = unit === '1' ? flow : unit === 'm³/s' ? flowIn(flow, units) : specificIn(flow, units);
    return shown === null || shown === undefined || !Number.isFinite(shown) ? null : Number(shown.toPrecision(5));
  });
}
