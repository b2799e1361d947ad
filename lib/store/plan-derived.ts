import type { DerivedRecipe } from '../series/station-history.ts';
import type { Plan, PlannedStation } from './apply-plan.ts';
import { type Connection, rows } from './connection.ts';
import { recipeOf } from './history-text.ts';
import { ImportRefused } from './import-refused.ts';
import { recipeProblem } from './recipes.ts';
import { stagedFileName } from './staged.ts';

/** Refuses days of a station whose record of that quantity is derived from others, and recipes that cannot be followed.
 *  @throws ImportRefused naming file and station */
export function refuseDerived(connection: Connection, { stations, said, groups }: Plan): void {
  const recipes = new Map<string, DerivedRecipe>();
  for (const { code, facts } of stations.values()) {
    const recipe = recipeOf(facts.derived as string | null);
    if (recipe) recipes.set(code, recipe);
  }
  if (recipes.size === 0) return;
  for (const { station, quantity, staged } of groups) {
    if (recipes.get(station.code)?.quantity !== quantity || staged.length === 0) continue;
    throw new ImportRefused({
      file: stagedFileName(connection, staged[0].file),
      value: station.code,
      message: `the ${quantity} of this station is derived from other stations, and the file brings days of its own`,
      remedy: 'Give the measured days a station of their own, or take the recipe away first',
    });
  }
  for (const [file, changes] of said) {
    for (const { code, fields } of changes) {
      const recipe = fields.derived && recipes.get(code);
      const problem = recipe && problemOf(connection, stations.get(code)!, recipe, { stations, recipes });
      if (!problem) continue;
      throw new ImportRefused({
        file: stagedFileName(connection, file),
        value: code,
        message: `the recipe of this station cannot be followed: ${problem}`,
        remedy: 'Correct the recipe in the registry, or leave it out',
      });
    }
  }
}

function problemOf(
  connection: Connection,
  { id, code }: PlannedStation,
  recipe: DerivedRecipe,
  { stations, recipes }: { stations: ReadonlyMap<string, PlannedStation>; recipes: ReadonlyMap<string, DerivedRecipe> },
): string | null {
  const measured = rows(connection, 'SELECT 1 FROM main.Part WHERE stationId = ? AND quantity = ? LIMIT 1');
  if (measured.get([id, recipe.quantity])) return `The station has imported days of ${recipe.quantity}.`;
  return recipeProblem(code, recipe, { recipes, codes: stations });
}
