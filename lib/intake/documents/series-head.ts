import type { Quantity, Unit } from '../../series/quantities.ts';
import type { FoundFacts } from '../types.ts';
import { quantityNamed, type Statistic } from './observed-quantity.ts';
import type { StampMeaning } from './time-stamp.ts';
import { unitFor, unitOfCode } from './unit-code.ts';

/** What a document says of a series before its points. */
export interface SeriesHead {
  /** by which the station may be known, the surest first; empty where the document names none */
  names: string[];
  facts: Omit<FoundFacts, 'code'>;
  /** the observed property in words, empty where the document says none */
  property: string;
  /** its code, or the last part of its address */
  propertyCode: string;
  statistic: Statistic;
  /** the statistic as written */
  statisticText: string;
  unitText: string;
  meaning: StampMeaning;
  /** days that a value stands for, or that lie between values; null where the document does not say */
  stepDays: number | null;
  /** numbers that mean "no value" */
  noData: number[];
}

/** What a series is of: by its property, or where the document names none, by a unit that only one quantity has. */
export function quantityOf(head: SeriesHead): Quantity | null {
  if (head.property === '' && head.propertyCode === '') return unitOfHead(head, 'flow') === null ? null : 'flow';
  return quantityNamed(head.property, head.propertyCode);
}

/** The unit that a series says for itself; null where it is none of the quantity. */
export function unitOfHead(head: SeriesHead, quantity: Quantity): Unit | null {
  return unitFor(quantity, unitOfCode(head.unitText));
}

/** A series in words, by which it can be asked for: its property and, where it is no mean, its statistic. */
export function labelOf(head: SeriesHead): string {
  const property = head.property || head.propertyCode || `series in ${head.unitText || 'no unit'}`;
  return head.statistic === 'other' ? `${property}, ${head.statisticText}` : property;
}
