/** What the checks look for: negative flows, repeated dates, jumps from day to day, flat runs, steps in the annual mean, a
 *  change of unit between years, dates in the future, and more water than a catchment can give. */
export const FINDING_KINDS = [
  ...(['negative', 'repeated', 'jump', 'flat', 'step', 'unit-change', 'future', 'too-large'] as const),
] as const;
export type FindingKind = (typeof FINDING_KINDS)[number];

/** What a check found on a stretch of a record. It marks; it never deletes. */
export interface Finding {
  kind: FindingKind;
  /** day numbers, both included */
  firstDay: number;
  lastDay: number;
  /** days of the stretch that are at fault */
  days: number;
  /** the figures behind it, in m³/s and plain numbers: what was found, and against what */
  detail: Record<string, number | string | null>;
}

/** Kinds whose days carry the suspect flag; a step in the mean says nothing against any one day. */
export const SUSPECT_KINDS: readonly FindingKind[] = [
  ...(['negative', 'repeated', 'jump', 'flat', 'unit-change', 'future', 'too-large'] as const),
];
