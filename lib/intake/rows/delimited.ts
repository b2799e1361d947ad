import type { Fields, LineSplitter } from './fields.ts';

const QUOTE = 34;
const BLANK = 32;
const RETURN = 13;

/** Lines whose fields are set apart by one byte: comma, semicolon or tab. Fields may be quoted ("…", a quote inside
 *  doubled); a quoted field ends on its line. */
export class DelimitedLines implements LineSplitter {
  constructor(
    private readonly delimiter: number,
    private readonly lineEnd: number,
  ) {}

  split(bytes: Uint8Array, from: number, limit: number, fields: Fields): number {
    const { delimiter, lineEnd } = this;
    let start = fields.start;
    let end = fields.end;
    let count = 0;
    let first = from;
    let at = from;
    let blanks = false;
    fields.unclosed = false;
    for (; at < limit; at++) {
      const byte = bytes[at];
      // Digits, letters, points and dashes first: all bytes above the comma but the semicolon are only text.
      if (byte > 44 && byte !== 59) continue;
      if (byte === delimiter) {
        start[count] = first;
        end[count] = at;
        if (++count === start.length) {
          fields.grow();
          start = fields.start;
          end = fields.end;
        }
        first = at + 1;
      } else if (byte === lineEnd) break;
      else if (byte === BLANK) blanks = true;
      else if (byte === QUOTE) return this.splitQuoted(bytes, from, limit, fields);
    }
    start[count] = first;
    end[count] = at;
    fields.count = count + 1;
    fields.lineStart = from;
    fields.lineEnd = at;
    if (at > from && bytes[at - 1] === RETURN) {
      fields.lineEnd = at - 1;
      if (end[count] > start[count]) end[count] = at - 1;
    }
    if (blanks) for (let field = 0; field <= count; field++) trim(bytes, start, end, field);
    return at + 1;
  }

  /** The same for a line that holds a quote somewhere. */
  private splitQuoted(bytes: Uint8Array, from: number, limit: number, fields: Fields): number {
    let lineEnd = from;
    while (lineEnd < limit && bytes[lineEnd] !== this.lineEnd) lineEnd++;
    const next = lineEnd + 1;
    if (lineEnd > from && bytes[lineEnd - 1] === RETURN) lineEnd--;
    fields.lineStart = from;
    fields.lineEnd = lineEnd;
    fields.count = 0;
    let at = from;
    for (;;) {
      if (fields.count === fields.start.length) fields.grow();
      while (at < lineEnd && bytes[at] === BLANK) at++;
      at =
        bytes[at] === QUOTE && at < lineEnd
          ? this.quoted(bytes, at, lineEnd, fields)
          : this.bare(bytes, at, lineEnd, fields);
      fields.count++;
      if (at >= lineEnd) return next;
      at++;
    }
  }

  /** @returns place of the delimiter behind the field, or the line's end */
  private quoted(bytes: Uint8Array, open: number, lineEnd: number, fields: Fields): number {
    let at = open + 1;
    while (at < lineEnd && (bytes[at] !== QUOTE || bytes[at + 1] === QUOTE)) at += bytes[at] === QUOTE ? 2 : 1;
    fields.start[fields.count] = open + 1;
    fields.end[fields.count] = Math.min(at, lineEnd);
    if (at >= lineEnd) {
      fields.unclosed = true;
      return lineEnd;
    }
    trim(bytes, fields.start, fields.end, fields.count);
    let behind = at + 1;
    while (behind < lineEnd && bytes[behind] !== this.delimiter) {
      if (bytes[behind] !== BLANK) fields.unclosed = true;
      behind++;
    }
    return behind;
  }

  private bare(bytes: Uint8Array, from: number, lineEnd: number, fields: Fields): number {
    let at = from;
    while (at < lineEnd && bytes[at] !== this.delimiter) at++;
    fields.start[fields.count] = from;
    fields.end[fields.count] = at;
    trim(bytes, fields.start, fields.end, fields.count);
    return at;
  }
}

function trim(bytes: Uint8Array, start: Int32Array, end: Int32Array, field: number): void {
  let first = start[field];
  let last = end[field];
  while (first < last && bytes[first] === BLANK) first++;
  while (last > first && bytes[last - 1] === BLANK) last--;
  start[field] = first;
  end[field] = last;
}
