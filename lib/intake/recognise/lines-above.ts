import type { KnownStation, StatedFacts } from '../types.ts';
import { factOfKey } from './fact-words.ts';
import type { SampleLine, SampleRow } from './sample.ts';
import { factsIn, pairOf, pairsAcross, type StatedPair, stationsListed } from './stated-facts.ts';

/** What the lines above a table say. */
export interface LinesAbove {
  /** comment and title lines as written */
  remarks: string[];
  facts: StatedFacts[];
  /** every number of a station that stands above the table; offices have numbers of their own for one */
  codes: string[];
  /** what stands behind "Unit:" and its like */
  units: string[];
}

/** Reads comment lines and the title lines above a table.
 *  @param comments   of the whole sample; what they say of the station counts where they stand above the data
 *  @param titles     title lines, split like the table
 *  @param firstLine  line number of the first row of data */
export function readLinesAbove(
  comments: readonly SampleLine[],
  titles: readonly { text: string; row: SampleRow }[],
  { delimiter, firstLine }: { delimiter: string | null; firstLine: number },
): LinesAbove {
  const texts = comments.map(({ text }) => text);
  const remarks = [...texts, ...titles.map(({ text }) => text)];
  const across: StatedPair[] = [];
  // The lines of a small table are no pairs of their own.
  const tables = new Set<string>();
  for (let at = 0; at + 1 < titles.length; at++) {
    const found = pairsAcross(titles[at].row.fields, titles[at + 1].row.fields);
    across.push(...found);
    if (found.length > 0) for (const { text } of [titles[at], titles[at + 1]]) tables.add(text);
  }
  const lines = [...comments.filter(({ line }) => line < firstLine), ...titles].flatMap(({ text }) =>
    tables.has(text) ? [] : [text],
  );
  const pairs = [...lines.flatMap((text) => pairOf(text, delimiter) ?? []), ...across];
  const stated = factsIn(pairs);
  const listed = stationsListed(texts);
  const units = pairs.flatMap(({ key, value }) => (factOfKey(key) === 'unit' ? [value] : []));
  const codes = pairs.flatMap((pair) => factsIn([pair]).code ?? []);
  const facts = Object.keys(stated).length > 0 ? [stated] : [];
  return { remarks, facts: stated.code === undefined && listed.length > 0 ? listed : facts, codes, units };
}

/** The station that the lines above a table name: by its number, or by a name that the registry has; null when neither
 *  does. */
export function stationAbove(
  facts: readonly StatedFacts[] | undefined,
  known: readonly KnownStation[] | null | undefined,
): string | null {
  if (facts?.length !== 1) return null;
  const [{ code, name }] = facts;
  if (code !== undefined) return code;
  const plain = name?.trim().toLowerCase();
  const bearers = known?.filter((station) => plain !== undefined && station.name.trim().toLowerCase() === plain) ?? [];
  return bearers.length === 1 ? bearers[0].code : null;
}
