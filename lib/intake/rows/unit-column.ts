import type { TablePlan } from '../recognise/table-plan.ts';
import { twoUnits } from '../recognise/unit-column.ts';
import { unitNamedIn } from '../units.ts';
import type { Fields } from './fields.ts';
import { fieldIs, textOf } from './row-reader.ts';

/** Holds every row of a table with a column of units to the unit of the first ones. */
export class UnitColumn {
  private readonly usual: Uint8Array;
  /** other ways of writing the same unit */
  private readonly same = new Set<string>();

  constructor(private readonly plan: TablePlan) {
    this.usual = new TextEncoder().encode(plan.unitText);
  }

  /** Why a row's unit will not do; null when it does.
   *  @throws IntakeError when it is another unit: the file holds two, and neither may be read as the other */
  problem(bytes: Uint8Array, fields: Fields, line: number): string | null {
    const { places, unitText, file, header } = this.plan;
    if (fieldIs(bytes, fields, places.unit, this.usual)) return null;
    const text = textOf(bytes, fields, places.unit);
    if (this.same.has(text)) return null;
    const [usual, unit] = [unitNamedIn(unitText), unitNamedIn(text)];
    if (unit !== null && usual !== null && unit !== usual) {
      const first = { line: this.plan.firstLine, text: unitText };
      throw twoUnits(file, [first, { line, text }], header?.[places.unit] ?? String(places.unit));
    }
    if (unit === null) return `the unit “${text}” is not that of the other rows, “${unitText}”`;
    this.same.add(text);
    return null;
  }
}
