/** The first rows of a file beside what they were understood as. */
import type { Inspection, UnderstoodRow } from '@/lib/intake/types';

export interface FirstRow {
  /** line number in the file; null where the file tells none */
  line: number | null;
  /** the fields of the line; null for a document, and for lines beyond those shown */
  fields: readonly string[] | null;
  /** what was understood of it: nothing, one value, or one for each of its columns */
  values: readonly UnderstoodRow[];
}

/** Values shown of one line: a wide file has as many as it has stations. */
const VALUES_OF_A_LINE = 6;
/** Values shown in all: those of some twenty lines. */
const VALUES = 120;

/** Lines in the order of the file, each with its values. A header row is no row. */
export function firstRows({ header, preview, previewLines, understood }: Omit<Inspection, 'problems'>): FirstRow[] {
  const byLine = new Map<number, UnderstoodRow[]>();
  for (const row of understood) byLine.set(row.row, [...(byLine.get(row.row) ?? []), row]);
  const isHeader = header !== null && preview[0]?.join('\t') === header.join('\t');
  const rows: FirstRow[] = [];
  for (const [at, fields] of previewLines ? preview.entries() : []) {
    if (at === 0 && isHeader) continue;
    const line = previewLines?.[at] ?? null;
    rows.push({ line, fields, values: line === null ? [] : (byLine.get(line) ?? []) });
    if (line !== null) byLine.delete(line);
  }
  // Beyond the lines that are shown only what is wrong is of interest.
  const shown = rows.some(({ values }) => values.length > 0);
  for (const [line, values] of byLine) {
    if (!shown || values.some(({ problem }) => problem !== null)) rows.push({ line, fields: null, values });
  }
  return bounded(rows.sort((a, b) => (a.line ?? 0) - (b.line ?? 0)));
}

function bounded(rows: readonly FirstRow[]): FirstRow[] {
  let left = VALUES;
  return rows.flatMap((row) => {
    if (left <= 0) return [];
    const values = row.values.slice(0, Math.min(left, VALUES_OF_A_LINE));
    left -= Math.max(1, values.length);
    return [{ ...row, values }];
  });
}
