import { type Finding, SUSPECT_KINDS } from './finding.ts';

/** The days that findings make suspect, as one list of first and last days, rising; stretches that touch are one.
 *  @param findings  by first day
 *  Example: findings on 3–5, 5–8 and 10–10 → [3, 8, 10, 10] */
export function suspectStretches(findings: readonly Finding[]): number[] {
  const stretches: number[] = [];
  for (const { kind, firstDay, lastDay } of findings) {
    if (!SUSPECT_KINDS.includes(kind)) continue;
    const end = stretches.length - 1;
    if (end > 0 && firstDay <= stretches[end] + 1) stretches[end] = Math.max(stretches[end], lastDay);
    else stretches.push(firstDay, lastDay);
  }
  return stretches;
}
