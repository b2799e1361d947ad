import { LF } from '../file-blocks.ts';
import { detectDelimiter, type SampleLine, splitSample, splitterFor } from '../recognise/sample.ts';
import { holdsCodes } from './registry-columns.ts';

/** Title lines that may stand above the header of a registry. */
export const MOST_TITLES = 30;

/** The sign between the fields of a registry: that of most rows, or where that leaves no header with a column of codes,
 *  another that does. Dated changes hold semicolons of their own, as many in every row as it may happen.
 *  @param lines  the first ones, without comments
 *  @returns null where nothing parts the rows */
export function registryDelimiter(lines: readonly SampleLine[]): ',' | ';' | '\t' | null {
  const usual = lines.length > 0 ? detectDelimiter(lines, LF) : null;
  if (usual === null) return null;
  const top = lines.slice(0, MOST_TITLES);
  const namesCodes = (delimiter: string) =>
    splitSample(top, splitterFor(delimiter, LF)).some(({ fields }) => fields.length > 1 && holdsCodes(fields));
  return [...new Set([usual, ',', ';', '\t'] as const)].find(namesCodes) ?? usual;
}
