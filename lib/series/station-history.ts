import type { FlowUnit } from './flow-units.ts';
import type { Quantity } from './quantities.ts';

/** What may have changed at a station on a day, so that before and after are not one record. */
export const CHANGE_KINDS = [
  'dam',
  'abstraction',
  'discharge',
  'gauge moved',
  'weir changed',
  'rating changed',
  'other',
] as const;
export type ChangeKind = (typeof CHANGE_KINDS)[number];

/** A dated change on the river or at the gauge. */
export interface StationChange {
  /** ISO date */
  date: string;
  kind: ChangeKind;
  note: string;
}

export const NAMED_FLOW_KINDS = [
  'legal minimum',
  'abstraction stop',
  'residual flow',
  'intake level',
  'other',
] as const;
export type NamedFlowKind = (typeof NAMED_FLOW_KINDS)[number];

/** A flow that means something at a station: a legal minimum, the flow at which abstraction must stop. */
export interface NamedFlow {
  name: string;
  kind: NamedFlowKind;
  /** in `unit` */
  value: number;
  unit: FlowUnit;
  /** months (1 to 12) in which it holds; null: all year */
  months: number[] | null;
}

/** How the record of a derived station comes from other records: the sum of its terms, each day on which all of them have a
 *  value. */
export interface DerivedRecipe {
  quantity: Quantity;
  terms: {
    /** code of a station of the same region */
    code: string;
    /** −1 takes away */
    factor: number;
    /** the term's value of `lagDays` days before is used (travel time downstream) */
    lagDays: number;
  }[];
  note: string;
}
