import { type DateOrder, ORDER_BITS, ordersOf } from './dates.ts';
import { ORDER_WORDS, type TablePlan } from './recognise/table-plan.ts';
import type { Fields } from './rows/fields.ts';
import { RowLoop } from './rows/row-loop.ts';
import { type RowReader, textOf } from './rows/row-reader.ts';
import { IntakeError } from './types.ts';

const ORDERS = ['dmy', 'mdy', 'ymd'] as const;
const ALL = ORDER_BITS.ymd | ORDER_BITS.dmy | ORDER_BITS.mdy;

/** Rows that are looked at for contradictions where the first proof would do: quick, and most show themselves there. */
const LOOKED_AT = 10_000;

/** A date and its row. */
interface Seen {
  line: number;
  text: string;
  bits: number;
}

/** Looks at the date of every row for those that can be read only in some orders. */
class OrderWitness implements RowReader {
  /** orders in which every date so far is a day */
  possible = ALL;
  /** the date that narrowed the orders down, each time */
  readonly narrowing: Seen[] = [];
  /** a date that means unlike days in the orders left */
  open = '';
  rows = 0;

  constructor(private readonly column: number) {}

  read(bytes: Uint8Array, fields: Fields, line: number): null {
    const { column } = this;
    this.rows++;
    if (column >= fields.count || this.possible === 0) return null;
    const bits = ordersOf(bytes, fields.start[column], fields.end[column]);
    if (bits === 0) return null;
    if (this.open === '') this.open = textOf(bytes, fields, column);
    if ((this.possible & bits) === this.possible) return null;
    this.possible &= bits;
    this.narrowing.push({ line, text: textOf(bytes, fields, column), bits });
    return null;
  }
}

const ordersIn = (bits: number): DateOrder[] => ORDERS.filter((order) => (bits & ORDER_BITS[order]) !== 0);
const wordsOf = (bits: number): string =>
  ordersIn(bits)
    .map((order) => ORDER_WORDS[order])
    .join(' or ');

/** Finds in which order dates such as 4/3/2001 or 1/2/98 have day, month and year, from all dates of the file.
 *  @param firstProof  stop at the first date that decides it, and leave contradictions behind the first 10,000 rows to
 *                     the reading
 *  @throws IntakeError when no date decides it, or dates contradict one another */
export async function findDateOrder(
  path: string,
  plan: TablePlan,
  { signal, firstProof = false }: { signal?: AbortSignal; firstProof?: boolean } = {},
): Promise<DateOrder> {
  const witness = new OrderWitness(plan.places.date[0]);
  const isEnough = () => firstProof && witness.rows >= LOOKED_AT && ordersIn(witness.possible).length === 1;
  const stop = () => witness.possible === 0 || isEnough();
  await new RowLoop(plan, witness, { signal, stop }).read(path);
  if (witness.possible === 0) throw contradiction(plan, witness.narrowing);
  const left = ordersIn(witness.possible);
  // Dates that mean the same day either way (5/5/2001) ask for no decision.
  if (left.length === 1 || witness.open === '') return left[0];
  throw new IntakeError({
    file: plan.file,
    value: witness.open,
    message:
      witness.possible === ALL
        ? 'every date of the file can be read in any order of day, month and year'
        : (witness.possible & ORDER_BITS.ymd) === 0
          ? 'every date of the file can be read day first or month first'
          : 'every date of the file can be read in several orders',
    remedy: `Say the order: ${left.map((order) => ORDER_WORDS[order]).join(' or ')} (in a mapping, {"date": {"columns": [${plan.places.date[0]}], "order": "${left[0]}"}})`,
    needs: 'date-order',
  });
}

/** Two dates that no order fits: the last one met, and an earlier one that rules its orders out. */
function contradiction(plan: TablePlan, narrowing: readonly Seen[]): IntakeError {
  const later = narrowing[narrowing.length - 1];
  const earlier = narrowing.find(({ bits }) => (bits & later.bits) === 0) ?? narrowing[0];
  return new IntakeError({
    file: plan.file,
    row: later.line,
    value: later.text,
    message: `dates contradict one another: “${earlier.text}” in row ${earlier.line} can only be ${wordsOf(earlier.bits)}, “${later.text}” in row ${later.line} only ${wordsOf(later.bits)}`,
    remedy: 'Put the dates right, or say the order that holds; rows in another order are then rejected',
    needs: 'date-order',
  });
}
