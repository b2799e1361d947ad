import { endOfLine, type Fields, type LineSplitter, trimmedEnd } from './fields.ts';

/** Lines whose fields are set apart by one or more blanks or tabs; blanks at either end of a line are padding. */
export class WhitespaceLines implements LineSplitter {
  constructor(private readonly lineEnd: number) {}

  split(bytes: Uint8Array, from: number, limit: number, fields: Fields): number {
    const lineEnd = endOfLine(bytes, from, limit, this.lineEnd);
    const last = trimmedEnd(bytes, from, lineEnd);
    fields.lineStart = from;
    fields.lineEnd = last;
    fields.unclosed = false;
    let count = 0;
    let at = from;
    while (at < last) {
      while (at < last && (bytes[at] === 32 || bytes[at] === 9)) at++;
      const start = at;
      while (at < last && bytes[at] !== 32 && bytes[at] !== 9) at++;
      if (count === fields.start.length) fields.grow();
      fields.start[count] = start;
      fields.end[count] = at;
      count++;
    }
    fields.count = count;
    return lineEnd + 1;
  }
}
