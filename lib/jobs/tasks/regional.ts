import type { Corner } from '../../region/in-polygon.ts';
import type { Ranking } from '../../region/ranking-types.ts';
import { type Chance, regionalAnswers, type SharedWater } from '../../region/regional-answers.ts';
import type { RegionalAnswers } from '../../region/regional-types.ts';

/** What a region's stations say together. In a worker, since thousands of stations take a moment. */
export function regional(task: {
  ranking: Ranking;
  chance: Chance;
  water: SharedWater;
  area: readonly Corner[] | null;
}): RegionalAnswers {
  return regionalAnswers(task.ranking, task.chance, task.water, task.area);
}
