import { orderShownBy } from './dates.ts';
import { ORDER_WORDS, type TablePlan } from './recognise/table-plan.ts';
import type { Fields } from './rows/fields.ts';
import { RowLoop } from './rows/row-loop.ts';
import { type RowReader, textOf } from './rows/row-reader.ts';
import { IntakeError } from './types.ts';

/** Looks at the date of every row for one that can be read only one way. */
class OrderWitness implements RowReader {
  /** first row that proves each order */
  readonly seen: { dmy?: { line: number; text: string }; mdy?: { line: number; text: string } } = {};
  open = '';

  constructor(private readonly column: number) {}

  read(bytes: Uint8Array, fields: Fields, line: number): null {
    const { column } = this;
    if (column >= fields.count) return null;
    const shown = orderShownBy(bytes, fields.start[column], fields.end[column]);
    if (shown === 'dmy' || shown === 'mdy') this.seen[shown] ??= { line, text: textOf(bytes, fields, column) };
    else if (shown === 'either' && this.open === '') this.open = textOf(bytes, fields, column);
    return null;
  }
}

/** Finds whether dates such as 4/3/2001 are day first or month first, from all dates of the file.
 *  @param firstProof  stop at the first date that decides it, and leave contradictions to the reading
 *  @throws IntakeError when no date decides it, or dates contradict one another */
export async function findDateOrder(
  path: string,
  plan: TablePlan,
  { signal, firstProof = false }: { signal?: AbortSignal; firstProof?: boolean } = {},
): Promise<'dmy' | 'mdy'> {
  const witness = new OrderWitness(plan.places.date[0]);
  const { seen } = witness;
  const stop = firstProof ? () => seen.dmy !== undefined || seen.mdy !== undefined : undefined;
  await new RowLoop(plan, witness, { signal, stop }).read(path);
  const { dmy, mdy } = seen;
  if (dmy && mdy) {
    throw new IntakeError({
      file: plan.file,
      row: Math.max(dmy.line, mdy.line),
      value: dmy.line > mdy.line ? dmy.text : mdy.text,
      message: `dates contradict one another: “${dmy.text}” in row ${dmy.line} can only be day first, “${mdy.text}” in row ${mdy.line} only month first`,
      remedy: `Put the dates right, or say their order: ${ORDER_WORDS.dmy} or ${ORDER_WORDS.mdy}`,
      needs: 'date-order',
    });
  }
  if (dmy) return 'dmy';
  if (mdy) return 'mdy';
  // Dates that mean the same day either way (5/5/2001) ask for no decision.
  if (witness.open === '') return 'dmy';
  throw new IntakeError({
    file: plan.file,
    value: witness.open,
    message: 'every date of the file can be read day first or month first',
    remedy: `Say the order: ${ORDER_WORDS.dmy} or ${ORDER_WORDS.mdy} (in a mapping, {"date": {"columns": [${plan.places.date[0]}], "order": "dmy"}})`,
    needs: 'date-order',
  });
}
