import { LF } from '../file-blocks.ts';
import { looksLikeDate } from '../recognise/column-facts.ts';
import { roleOfHeading } from '../recognise/heading-roles.ts';
import { detectDelimiter, sampleLines, splitSample, splitterFor } from '../recognise/sample.ts';

const LATITUDE = /^(lat|latitude|breite|breitengrad)(_|\b)|_lat(itude)?$/i;
const LONGITUDE = /^(lon|long|lng|longitude|länge|längengrad)(_|\b)|_(lon|long|lng|longitude)$/i;
const OTHER_FACT = /area|name|river|fläche|superficie/i;

/** Rows below the header that are looked through for dates. */
const ROWS_LOOKED_AT = 20;

const isFilled = (field: string): boolean => field.trim() !== '';

/** Whether a table's first lines are those of a station registry: of stations, with their places or their areas and without
 *  dates.
 *  @param head       the first bytes of the file, UTF-8
 *  @param wholeFile  they are all of it: also the last line is whole */
export function looksLikeRegistry(head: Uint8Array, wholeFile: boolean): boolean {
  const lines = sampleLines(head, LF, wholeFile).filter(({ text }) => !text.startsWith('#'));
  const delimiter = lines.length > 0 ? detectDelimiter(lines, LF) : null;
  if (delimiter === null) return false;
  const all = splitSample(lines.slice(0, ROWS_LOOKED_AT), splitterFor(delimiter, LF));
  // Titles above the table stand alone in their rows.
  const [header, ...rows] = all.slice(
    Math.max(
      0,
      all.findIndex(({ fields }) => fields.filter(isFilled).length > 1),
    ),
  );
  const headings = header.fields.map((field) => field.trim());
  const roles = headings.map(roleOfHeading);
  if (roles.includes('date') || rows.some(({ fields }) => fields.some(looksLikeDate))) return false;
  const placed = headings.some((text) => LATITUDE.test(text)) && headings.some((text) => LONGITUDE.test(text));
  const named = roles.includes('station') || roles.includes('maybe-station');
  return placed || (named && !roles.includes('value') && headings.some((text) => OTHER_FACT.test(text)));
}
