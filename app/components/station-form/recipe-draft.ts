import type { Quantity } from '@/lib/series/quantities';
import type { DerivedRecipe } from '@/lib/series/station-history';

/** One summand as it stands in the fields. */
export interface TermDraft {
  key: number;
  /** code of a station, or "code – name" as the list offers it */
  station: string;
  takesAway: boolean;
  size: string;
  lag: string;
}

export interface RecipeDraft {
  quantity: Quantity;
  terms: TermDraft[];
  note: string;
}

/** A station as it is offered and typed. */
export interface StationChoice {
  code: string;
  name: string;
}

export const offered = ({ code, name }: StationChoice): string => `${code} – ${name}`;

export const newTerm = (key: number, station = ''): TermDraft => ({
  ...{ key, station, takesAway: false, size: '1', lag: '0' },
});

export function recipeDraftOf(recipe: DerivedRecipe, stations: readonly StationChoice[]): RecipeDraft {
  return {
    quantity: recipe.quantity,
    note: recipe.note,
    terms: recipe.terms.map(({ code, factor, lagDays }, key) => {
      const known = stations.find((station) => station.code === code);
      return {
        ...{ key, station: known ? offered(known) : code, takesAway: factor < 0 },
        ...{ size: String(Math.abs(factor)), lag: String(lagDays) },
      };
    }),
  };
}

/** What the fields say as a recipe, and what is wrong by the field it is said beside: `terms.2.lag`, the number being the
 *  row's key. The recipe holds the terms that can be read, so that it can be shown while it grows. */
export function readRecipe(
  { quantity, terms, note }: RecipeDraft,
  stations: readonly StationChoice[],
): { recipe: DerivedRecipe; problems: Record<string, string> } {
  const problems: Record<string, string> = {};
  const read = terms.flatMap(({ key, station, takesAway, size, lag }) => {
    const code = codeOf(station, stations);
    if (code === null) problems[`terms.${key}.station`] = 'Choose a station of the list, by code or name.';
    const factor = /^(\d+\.?\d*|\.\d+)$/.test(size.trim()) ? Number(size) : Number.NaN;
    if (!(factor > 0)) problems[`terms.${key}.size`] = 'A number above 0 with a decimal point.';
    const lagDays = /^[-−]?\d+$/.test(lag.trim()) ? Number(lag.trim().replace('−', '-')) : Number.NaN;
    if (!(Math.abs(lagDays) <= 366)) problems[`terms.${key}.lag`] = 'Whole days, at most 366.';
    if (code === null || !(factor > 0) || Number.isNaN(lagDays)) return [];
    return [{ code, factor: takesAway ? -factor : factor, lagDays }];
  });
  if (terms.length === 0) problems.terms = 'A derived record comes from at least one station.';
  return { recipe: { quantity, terms: read, note: note.trim() }, problems };
}

/** The station that a text means: its code, its name, or both as offered; null when none, or a name that several have. */
function codeOf(text: string, stations: readonly StationChoice[]): string | null {
  const wanted = text.trim();
  const exact = stations.find((station) => station.code === wanted || offered(station) === wanted);
  if (exact) return exact.code;
  const named = stations.filter(({ name }) => name.toLowerCase() === wanted.toLowerCase());
  return named.length === 1 ? named[0].code : null;
}
