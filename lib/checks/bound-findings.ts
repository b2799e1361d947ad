import type { Finding, FindingKind } from './finding.ts';

/** Findings of one kind that a record lists; a coarse record may have a thousand flat runs. */
export const MOST_OF_A_KIND = 200;

/** At most 200 findings of a kind: the last of them then speaks for all the rest, from the first day of these to the last,
 *  with the days of all of them. Its detail says how many they are as `more`.
 *  @param findings  by first day */
export function boundFindings(findings: readonly Finding[]): Finding[] {
  const byKind = new Map<FindingKind, Finding[]>();
  for (const finding of findings) {
    const ofKind = byKind.get(finding.kind);
    if (ofKind) ofKind.push(finding);
    else byKind.set(finding.kind, [finding]);
  }
  return [...byKind.values()].flatMap((ofKind) =>
    ofKind.length <= MOST_OF_A_KIND
      ? ofKind
      : [...ofKind.slice(0, MOST_OF_A_KIND - 1), restOf(ofKind.slice(MOST_OF_A_KIND - 1))],
  );
}

function restOf(findings: readonly Finding[]): Finding {
  return {
    kind: findings[0].kind,
    firstDay: findings[0].firstDay,
    lastDay: Math.max(...findings.map(({ lastDay }) => lastDay)),
    days: findings.reduce((sum, { days }) => sum + days, 0),
    detail: { more: findings.length },
  };
}
