/** Where the fields of one line stand in a block of bytes. One object serves a whole file: filled anew for each line. */
export class Fields {
  /** first byte of each field and the byte after its last, blanks and quotes around it left out */
  start: Int32Array;
  end: Int32Array;
  count = 0;
  /** the line itself, without its line end */
  lineStart = 0;
  lineEnd = 0;
  /** a quoted field was not closed on its line */
  unclosed = false;

  constructor(capacity: number) {
    this.start = new Int32Array(capacity);
    this.end = new Int32Array(capacity);
  }

  /** Makes room for twice as many fields. */
  grow(): void {
    const start = new Int32Array(this.start.length * 2);
    const end = new Int32Array(this.end.length * 2);
    start.set(this.start);
    end.set(this.end);
    this.start = start;
    this.end = end;
  }
}

/** Splits one line of a block into its fields.
 *  @param from   first byte of the line
 *  @param limit  end of the block, exclusive
 *  @returns      first byte of the next line */
export interface LineSplitter {
  split(bytes: Uint8Array, from: number, limit: number, fields: Fields): number;
}

const BLANK = 32;
const TAB = 9;

/** End of the line that starts at `from`: its line end, or the end of the block. */
export function endOfLine(bytes: Uint8Array, from: number, limit: number, lineEnd: number): number {
  let at = from;
  while (at < limit && bytes[at] !== lineEnd) at++;
  return at;
}

/** End of a line's text: without a carriage return and the blanks before the line end. */
export function trimmedEnd(bytes: Uint8Array, start: number, end: number): number {
  let at = end;
  while (at > start && (bytes[at - 1] === 13 || bytes[at - 1] === BLANK || bytes[at - 1] === TAB)) at--;
  return at;
}
