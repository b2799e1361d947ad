/** Changes to what a person says about a file, each small enough to be made to many files at once. */
import type { Mapping } from '@/lib/intake/types';
import type { FileChoices } from '@/lib/jobs/import-types';

/** Keys to set; a key that is undefined goes back to what is recognised. */
export interface ChoicesEdit extends Partial<Omit<FileChoices, 'mapping'>> {
  mapping?: Partial<Mapping>;
  /** holds for the file at hand only: files that are laid out alike are of other stations */
  own?: boolean;
  /** everything goes back to what is recognised, before the other keys are set */
  reset?: boolean;
}

/** A mapping with what a person has just said laid over it, before the server has looked at the file anew. */
export function shownMapping(recognised: Mapping, { mapping = {}, unit }: FileChoices): Mapping {
  return { ...recognised, ...mapping, unit: mapping.unit ?? unit ?? recognised.unit };
}

/** Keys of a mapping that say where things stand: they hold for one layout and delimiter only. */
const PLACES: readonly (keyof Mapping)[] = ['station', 'date', 'value', 'flag', 'where', 'also'];

/** The choices with an edit laid over them. A new layout, delimiter or sheet drops the places chosen before. */
export function edited(said: FileChoices, { own, reset, mapping: keys, ...rest }: ChoicesEdit): FileChoices {
  const choices: FileChoices = reset ? {} : said;
  const moved = keys !== undefined && ['layout', 'delimiter', 'sheet'].some((key) => key in keys);
  const before = moved ? without(choices.mapping ?? {}, PLACES) : choices.mapping;
  const mapping = keys === undefined ? before : defined({ ...before, ...keys });
  const out = defined({ ...choices, ...rest, mapping });
  return mapping !== undefined && Object.keys(mapping).length === 0 ? without(out, ['mapping']) : out;
}

function defined<Row extends object>(row: Row): Row {
  return Object.fromEntries(Object.entries(row).filter(([, value]) => value !== undefined)) as Row;
}

function without<Row extends object>(row: Row, keys: readonly (keyof Row)[]): Row {
  return Object.fromEntries(Object.entries(row).filter(([key]) => !keys.includes(key as keyof Row))) as Row;
}

/** Whether two files are spoken of alike, in whatever order it was said. */
export const sameChoices = (a: unknown, b: unknown): boolean => inOrder(a) === inOrder(b);

function inOrder(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([x], [y]) => (x < y ? -1 : 1)))
      : part,
  );
}
