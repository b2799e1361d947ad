import { endOfLine, type Fields, type LineSplitter, trimmedEnd } from './fields.ts';

/** Lines whose fields stand at fixed characters. A field that a line does not reach to its end is left out of the
 *  count, so that a row cut short shows. */
export class FixedWidthLines implements LineSplitter {
  constructor(
    private readonly slices: readonly (readonly [number, number])[],
    private readonly lineEnd: number,
  ) {}

  split(bytes: Uint8Array, from: number, limit: number, fields: Fields): number {
    const lineEnd = endOfLine(bytes, from, limit, this.lineEnd);
    const last = trimmedEnd(bytes, from, lineEnd);
    fields.lineStart = from;
    fields.lineEnd = last;
    fields.unclosed = false;
    fields.count = 0;
    if (last === from) return lineEnd + 1;
    while (fields.start.length < this.slices.length) fields.grow();
    // Blank padding at the end of a line belongs to its fields, so it counts for the reach but not for the text.
    const reach = bytes[lineEnd - 1] === 13 ? lineEnd - 1 : lineEnd;
    let whole = true;
    for (let field = 0; field < this.slices.length; field++) {
      let start = Math.min(from + this.slices[field][0], reach);
      let end = Math.min(from + this.slices[field][1], reach);
      if (from + this.slices[field][1] > reach) whole = false;
      while (start < end && (bytes[start] === 32 || bytes[start] === 9)) start++;
      while (end > start && (bytes[end - 1] === 32 || bytes[end - 1] === 9)) end--;
      fields.start[field] = start;
      fields.end[field] = end;
    }
    fields.count = whole ? this.slices.length : this.slices.length - 1;
    return lineEnd + 1;
  }

  /** True when the line ends within a field that holds something: numbers are padded on their left, so it was cut. */
  cuts(fields: Fields, field: number): boolean {
    const length = fields.lineEnd - fields.lineStart;
    return fields.end[field] > fields.start[field] && length < this.slices[field][1];
  }
}
