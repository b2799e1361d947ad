import type { SampleLine } from './sample.ts';

/** Signs that comment lines begin with, beside `#`. A semicolon counts only where it sets no columns apart. */
const SIGNS = ['//', '%', '*', '!', ';', "'"];

/** The sign of a file's comment lines beside `#`: that of its first line, when other lines have it too and yet others,
 *  below them, do not. Null when there is none. */
export function commentSign(lines: readonly SampleLine[]): string | null {
  const first = lines[0]?.text ?? '';
  const sign = SIGNS.find((mark) => first.startsWith(mark) || first.startsWith(`"${mark}`));
  if (sign === undefined) return null;
  const below = lines.findIndex(({ text }) => !isComment(text, sign));
  if (below < 0) return null;
  // The data below a block of lines with semicolons in front must not begin with one themselves.
  return sign === ';' && lines.slice(below).some(({ text }) => text.startsWith(sign)) ? null : sign;
}

/** True for a line that is a comment, also one that a spreadsheet has put in quotes. */
export function isComment(text: string, sign: string | null): boolean {
  const start = text.startsWith('"') ? 1 : 0;
  return text.startsWith('#', start) || (sign !== null && text.startsWith(sign, start));
}
