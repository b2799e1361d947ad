import type { ZeroRule } from './index-facts.ts';

/** How complete a station's years must be to be ranked. */
export interface CompletenessRule {
  /** usable years needed */
  minYears: number;
  /** share of the period, and of its first and its last ten years, that must be usable: 0 to 1 */
  minCoverage: number;
}

/** Years at each end of the period that are judged by themselves, so that no record covers one end only. */
export const END_YEARS = 10;

/** Fewest usable years of `length` that make up the share; both sides compared as real numbers.
 *  Example: 0.8 of 38 is 30.4, so 31 */
export function yearsNeeded(minCoverage: number, length: number): number {
  // 0.55 × 20 comes to 11.000000000000002, which 11 years do satisfy
  return Math.max(0, Math.ceil(minCoverage * length - 1e-9));
}

/** True when zeros keep a station out of the ranking: a third or more of the annual figures, for a slope would then say
 *  little; or, by the rule `all`, every one of them. */
export function tooManyZeros(zeros: number, years: number, rule: ZeroRule = 'a-third'): boolean {
  if (years <= 0 || rule === 'none') return false;
  return rule === 'all' ? zeros >= years : 3 * zeros >= years;
}
