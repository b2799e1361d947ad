import { UNITS_OF } from '../../series/quantities.ts';
import { type FlowUnit, IntakeError, type Quantity } from '../types.ts';
import { DAILY_DISCHARGE, unitNamedIn, unitsNamedIn } from '../units.ts';

/** The unit that a file states, looked for where it is said most closely first: the value's heading, the column of
 *  units, a line "Unit: …" above the table, then comment and title lines (only when all of these together name just one).
 *  @param headings  heading of the value column; in a wide table, of every station's column */
export function findUnit(found: {
  headings: string[];
  unitText: string;
  units: string[];
  remarks: string[];
}): FlowUnit | null {
  if (found.headings.length > 0 && found.headings.every((heading) => DAILY_DISCHARGE.test(heading))) return 'ft3/s';
  const stated = new Set(found.units.flatMap(unitsNamedIn));
  const inHeadings = new Set(found.headings.map(unitNamedIn));
  if (inHeadings.size === 1) {
    const [unit] = inHeadings;
    const inRows = unitNamedIn(found.unitText);
    // A line above, or the column of units, that says otherwise leaves it open.
    const isDenied = (stated.size === 1 && unit !== null && !stated.has(unit)) || (inRows !== null && inRows !== unit);
    if (unit !== null) return isDenied ? null : unit;
  }
  if (found.unitText !== '') return unitNamedIn(found.unitText);
  // What the file calls its unit and is none of flow is another quantity's.
  if (found.units.length > 0) return stated.size === 1 ? [...stated][0] : null;
  const inRemarks = new Set(found.remarks.flatMap(unitsNamedIn));
  return inRemarks.size === 1 ? [...inRemarks][0] : null;
}

/** The question in which unit the values are. @param heading  of their column; null where they have none */
export function unitProblem(file: string, heading: string | null, quantity: Quantity = 'flow'): IntakeError {
  const units = UNITS_OF[quantity].join(', ');
  const isFlow = quantity === 'flow';
  return new IntakeError({
    file,
    ...(heading ? { value: heading } : {}),
    message: `the file does not say in which unit its ${isFlow ? 'flows' : 'values'} are`,
    remedy: `Say it: ${units}${isFlow ? ' (mm/d is a depth over the drainage area)' : ''}`,
    needs: 'unit',
  });
}
