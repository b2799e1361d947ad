import type { RankingRow } from '@/lib/region/ranking-types';

export interface StepTo {
  code: string;
  name: string;
}

/** The stations before and after one in the order of the ranking; the unranked follow the ranked ones. */
export function placeOf(rows: readonly RankingRow[], code: string): { previous: StepTo | null; next: StepTo | null } {
  const at = rows.findIndex((row) => row.code === code);
  const step = (index: number): StepTo | null =>
    at >= 0 && rows[index] ? { code: rows[index].code, name: rows[index].name } : null;
  return { previous: step(at - 1), next: step(at + 1) };
}
