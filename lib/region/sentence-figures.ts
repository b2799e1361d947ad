/** Figures as they stand in sentences. */

/** Two significant digits, or all digits before the point: 6.2, 0.31, 128. */
export function plain(value: number): string {
  if (Number.isNaN(value)) return 'an unknown amount';
  return Math.abs(value) >= 100 ? String(Math.round(value)) : String(Number(value.toPrecision(2)));
}

/** With its sign, a true minus: −6.2, +1.7, 0. */
export function signed(value: number): string {
  const text = plain(Math.abs(value));
  if (!(Math.abs(value) > 0) || text === '0') return text;
  return `${value < 0 ? '−' : '+'}${text}`;
}

/** Example: "95 % interval −9.1 to −2.8" */
export function intervalWords(low: number | null, high: number | null): string {
  if (low === null || high === null) return 'too few years for a 95 % interval';
  return `95 % interval ${signed(low)} to ${signed(high)}`;
}

/** A p-value: two significant digits, "below 0.001", or "none".
 *  @param alpha  what p was held against: a p that only rounds up to it is "just below" it */
export function probability(p: number | null, alpha = Number.NaN): string {
  if (p === null) return 'none';
  if (p < 0.001) return 'below 0.001';
  return p < alpha && Number(plain(p)) >= alpha ? `just below ${alpha}` : plain(p);
}

/** Beside what was not found: what would have been. Empty where that is not known. */
export const detectableWords = (percent: number | null): string =>
  percent === null
    ? ''
    : ` These years would have shown ${plain(percent)} % per decade or more, either way, in four cases of five.`;
