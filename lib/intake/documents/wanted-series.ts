import { QUANTITIES, type Quantity, quantityWords, UNITS_OF, type Unit } from '../../series/quantities.ts';
import { type AlsoCandidate, type InspectOptions, IntakeError } from '../types.ts';
import { labelOf, quantityOf, type SeriesHead, unitOfHead } from './series-head.ts';

/** Name of the column by which a mapping's `where` asks for a series of a document. */
const SERIES_COLUMN = 'series';
const MOST_OTHERS = 100;
const SAMPLES = 5;

/** A series that is to be read, and as what. */
export interface Wanted {
  quantity: Quantity;
  unit: Unit | null;
  /** false: it is read beside the quantity that was asked for first */
  main: boolean;
}

/** Tells the series of a document that are to be read from those that are only offered. */
export class WantedSeries {
  /** series with points of quantities that were not asked for, by their words */
  readonly others = new Map<string, AlsoCandidate>();
  /** `said`: a person named the quantity, so that a series without a property may be taken for it by its unit */
  private readonly asked: { quantity: Quantity; unit?: Unit; series?: string; main: boolean; said: boolean }[];

  constructor({ mapping, unit }: InspectOptions) {
    const seriesOf = (where: { column: number | string; equals: string } | undefined) =>
      where?.column === SERIES_COLUMN ? where.equals : undefined;
    this.asked = [
      {
        quantity: mapping?.quantity ?? 'flow',
        unit: mapping?.unit ?? unit,
        series: seriesOf(mapping?.where),
        main: true,
        said: mapping?.quantity !== undefined,
      },
      ...(mapping?.also ?? []).map((also) => ({ ...also, series: seriesOf(also.where), main: false, said: true })),
    ];
  }

  /** The first of what was asked for. */
  get main(): Quantity {
    return this.asked[0].quantity;
  }

  /** Whether a series is to be read. One of no mean is, when it was asked for by its words.
   *  @returns null for one that is only offered; `unit: null` where nobody says it */
  choose(head: SeriesHead): Wanted | null {
    const label = labelOf(head);
    const quantity = quantityOf(head);
    const unnamed = isUnnamed(head);
    for (const { quantity: wanted, unit, series, main, said } of this.asked) {
      const isOf = quantity === wanted || (said && unnamed && unitOfHead(head, wanted) !== null);
      const fits = series === undefined ? isOf && isDayValue(head, wanted) : series === label;
      if (fits) return { quantity: wanted, unit: unit ?? unitOfHead(head, wanted), main };
    }
    this.offer(label, quantity, head);
    return null;
  }

  private offer(label: string, quantity: Quantity | null, head: SeriesHead): void {
    if (this.others.has(label) || this.others.size >= MOST_OTHERS) return;
    this.others.set(label, {
      ...{ label, samples: [], quantity, unit: quantity === null ? unitUnnamed(head) : unitOfHead(head, quantity) },
      ...{ value: { column: 'value' }, flag: { column: 'qualifier' }, where: { column: SERIES_COLUMN, equals: label } },
    });
  }

  /** Keeps the first values of a series that is only offered. */
  sample(head: SeriesHead, value: string): void {
    const samples = this.others.get(labelOf(head))?.samples;
    if (samples && samples.length < SAMPLES && value !== '') samples.push(value);
  }

  /** Why a unit cannot be that of the wanted series; null when it can. */
  unitProblem(file: string, head: SeriesHead, { quantity, unit }: Wanted): IntakeError | null {
    if (unit !== null && UNITS_OF[quantity].includes(unit)) return null;
    const written = unit ?? head.unitText;
    return new IntakeError({
      file,
      ...(written === '' ? {} : { value: written }),
      message:
        written === ''
          ? `the document does not say the unit of “${labelOf(head)}”`
          : `the unit of “${labelOf(head)}” is none of ${quantityWords(quantity)}`,
      remedy: `Say it: ${UNITS_OF[quantity].join(', ')}`,
      needs: 'unit',
    });
  }
}

/** The unit of a series whose property the document does not say, where it may be of a quantity that is kept. */
function unitUnnamed(head: SeriesHead): Unit | null {
  if (!isUnnamed(head)) return null;
  return QUANTITIES.map((quantity) => unitOfHead(head, quantity)).find((unit) => unit !== null) ?? null;
}

const isUnnamed = ({ property, propertyCode }: SeriesHead): boolean => property === '' && propertyCode === '';

/** Flows and levels are wanted as means of the day, depths as its sums. */
function isDayValue({ statistic, statisticText }: SeriesHead, quantity: Quantity): boolean {
  if (statistic !== 'other') return true;
  return (quantity === 'rainfall' || quantity === 'potential-evaporation') && /total|sum/i.test(statisticText);
}
