import { QUANTITIES, quantityWords } from '../../series/quantities.ts';
import { IntakeError, type Unit } from '../types.ts';
import { labelOf, type SeriesHead } from './series-head.ts';
import type { SeriesSink } from './series-sink.ts';

/** Values that stand for more than a day each. */
export function stepProblem(file: string, head: SeriesHead): IntakeError {
  return new IntakeError({
    file,
    value: labelOf(head),
    message: `its values stand for ${Math.round((head.stepDays ?? 0) * 10) / 10} days each, so they are no daily flows`,
    remedy: 'Get the daily values from whoever keeps the record; means of longer times cannot be taken apart into days',
  });
}

/** Two series of one station and quantity in unlike units. */
export function unitsDiffer(file: string, station: string, first: Unit, second: Unit): IntakeError {
  return new IntakeError({
    ...{ file, value: second },
    message: `station ${station} has two series of one quantity in different units, ${first} and ${second}`,
    remedy: 'Import them from separate documents',
  });
}

/** Why a document gave nothing; null when it gave something. */
export function nothingTaken(file: string, sink: SeriesSink): IntakeError | null {
  if (sink.hasMain && sink.rows > sink.rejectedTotal) return null;
  const first = sink.rejected[0];
  if (first !== undefined) {
    return new IntakeError({
      ...{ file, row: first.row, value: first.text.slice(0, 200), rows: sink.rejected },
      message: `none of its ${sink.rows} points can be read; of the first, ${first.reason}`,
      remedy: 'Check the document',
    });
  }
  const { others, main } = sink.wanted;
  const wanted = main === 'flow' ? 'daily flow' : `daily ${quantityWords(main)}`;
  if (others.size > 0) {
    // A series of a quantity that is kept, or of a unit that one of these may have, can be taken when a person says so.
    const takeable = [...others.values()].some(({ quantity, unit }) => quantity !== null || unit !== null);
    return new IntakeError({
      ...{ file, value: [...others.keys()].slice(0, 5).join('; ') },
      message: takeable
        ? `the document holds no series of ${wanted}`
        : `the document holds no series of ${wanted}, and none of another quantity that is kept here`,
      remedy: takeable
        ? 'Get the series of discharge, or say which series is to be taken, and as what'
        : `Get the series of discharge. What is kept: ${QUANTITIES.map(quantityWords).join(', ')}`,
      ...(takeable ? { needs: 'quantity' } : {}),
    });
  }
  const why =
    sink.categories > 0
      ? 'its series are of categories, not of numbers'
      : sink.emptySeries > 0
        ? `none of its ${sink.emptySeries} series has a value`
        : 'it holds no series';
  return new IntakeError({
    file,
    message: `the document gives no ${wanted}: ${why}`,
    remedy: 'Get the series of discharge',
  });
}
