import type { DerivedRecipe, NamedFlow, StationChange } from '../series/station-history.ts';

/** What is kept of a station as JSON, in one spelling each, so that equal lists are equal texts. */

/** Dated changes, the earliest first. */
export function changesText(changes: readonly StationChange[]): string {
  const inOrder = changes.map(({ date, kind, note }) => ({ date, kind, note }));
  return JSON.stringify(inOrder.sort((a, b) => compare(a.date, b.date)));
}

/** Named flows in the order given, their months in that of the year. */
export function namedFlowsText(flows: readonly NamedFlow[]): string {
  return JSON.stringify(
    flows.map(({ name, kind, value, unit, months }) => ({
      ...{ name, kind, value, unit },
      months: months === null ? null : [...months].sort((a, b) => a - b),
    })),
  );
}

/** The recipe of a derived station; null for a measured one. */
export function recipeText(recipe: DerivedRecipe | null): string | null {
  if (recipe === null) return null;
  const terms = recipe.terms.map(({ code, factor, lagDays }) => ({ code, factor, lagDays }));
  return JSON.stringify({ quantity: recipe.quantity, terms, note: recipe.note });
}

export const changesOf = (text: string): StationChange[] => JSON.parse(text) as StationChange[];
export const namedFlowsOf = (text: string): NamedFlow[] => JSON.parse(text) as NamedFlow[];
export const recipeOf = (text: string | null): DerivedRecipe | null =>
  text === null ? null : (JSON.parse(text) as DerivedRecipe);

const compare = (a: string, b: string): number => (a < b ? -1 : Number(a > b));
