import { LF } from '../intake/file-blocks.ts';
import { looksLikeDate } from '../intake/recognise/column-facts.ts';
import { roleOfHeading } from '../intake/recognise/heading-roles.ts';
import { detectDelimiter, sampleLines, splitSample, splitterFor } from '../intake/recognise/sample.ts';
import type { FileKind } from './import-types.ts';

/** What is looked at of a file's beginning, bytes. */
export const LOOKED_AT = 256 * 1024;

const LATITUDE = /^(lat|latitude|breite|breitengrad)(_|\b)|_lat(itude)?$/i;
const LONGITUDE = /^(lon|long|lng|longitude|länge|längengrad)(_|\b)|_(lon|long|lng|longitude)$/i;
const OTHER_FACT = /area|name|river|fläche|superficie/i;

/** Rows below the header that are looked through for dates. */
const ROWS_LOOKED_AT = 20;

/** What a file is, by what it holds and not by its name: a JSON object is a map layer; a table of stations, with their
 *  places or their areas and without dates, is a registry; anything else is taken for flows, whose reader says what is
 *  wrong with it.
 *  @param head  the first bytes of the file, UTF-8 where it is text */
export function recogniseKind(head: Uint8Array): FileKind {
  const start = new TextDecoder().decode(head.subarray(0, 64)).trimStart();
  if (start.startsWith('{') || start.startsWith('[')) return 'layer';
  return looksLikeRegistry(head) ? 'registry' : 'flows';
}

function looksLikeRegistry(head: Uint8Array): boolean {
  const lines = sampleLines(head, LF, head.length < LOOKED_AT).filter(({ text }) => !text.startsWith('#'));
  const delimiter = lines.length > 0 ? detectDelimiter(lines, LF) : null;
  if (delimiter === null) return false;
  const [header, ...rows] = splitSample(lines.slice(0, ROWS_LOOKED_AT), splitterFor(delimiter, LF));
  const headings = header.fields.map((field) => field.trim());
  const roles = headings.map(roleOfHeading);
  if (roles.includes('date') || rows.some(({ fields }) => fields.some(looksLikeDate))) return false;
  const placed = headings.some((text) => LATITUDE.test(text)) && headings.some((text) => LONGITUDE.test(text));
  const named = roles.includes('station') || roles.includes('maybe-station');
  return placed || (named && !roles.includes('value') && headings.some((text) => OTHER_FACT.test(text)));
}
