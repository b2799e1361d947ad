import type { Quantity } from '../series/quantities.ts';
import type { DerivedRecipe } from '../series/station-history.ts';

/** What is wrong with a recipe beside the others of its region, in a plain sentence; null when it can be followed.
 *  @param recipes  every other derived station of the region, by code
 *  @param codes    every station of the region */
export function recipeProblem(
  code: string,
  { quantity, terms }: DerivedRecipe,
  { recipes, codes }: { recipes: ReadonlyMap<string, DerivedRecipe>; codes: Pick<ReadonlySet<string>, 'has'> },
): string | null {
  for (const term of terms) {
    if (term.code === code) return `The record of ${code} cannot come from itself.`;
    if (!codes.has(term.code)) return `The region has no station "${term.code}" that ${code} could come from.`;
  }
  const way = wayTo(code, terms, quantity, recipes);
  return way && `${code} would come from itself: ${[code, ...way, code].join(' comes from ')}.`;
}

/** The stations by which a recipe leads back to `code`; null when it does not. */
function wayTo(
  code: string,
  terms: DerivedRecipe['terms'],
  quantity: Quantity,
  recipes: ReadonlyMap<string, DerivedRecipe>,
  seen = new Set<string>(),
): string[] | null {
  for (const term of terms) {
    if (term.code === code) return [];
    const recipe = recipes.get(term.code);
    if (recipe?.quantity !== quantity || seen.has(term.code)) continue;
    seen.add(term.code);
    const way = wayTo(code, recipe.terms, quantity, recipes, seen);
    if (way) return [term.code, ...way];
  }
  return null;
}
