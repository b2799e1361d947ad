import { IntakeError } from '../types.ts';

/** How the bytes of a document become text. */
export interface TextEncoding {
  /** label that TextDecoder takes */
  label: string;
  /** bytes of the mark at the start */
  mark: number;
  /** what the document says of itself was not followed */
  warning?: string;
}

const UTF8 = 'utf-8';

/** The encoding of a document: by its mark, by the zeros of UTF-16, else by its XML declaration, else UTF-8.
 *  Source: W3C, Extensible Markup Language 1.0 (5th edition), appendix F.
 *  @throws IntakeError for a declared encoding that nobody knows */
export function encodingOf(head: Uint8Array, file: string): TextEncoding {
  if (head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf) return { label: UTF8, mark: 3 };
  if (head[0] === 0xff && head[1] === 0xfe) return { label: 'utf-16le', mark: 2 };
  if (head[0] === 0xfe && head[1] === 0xff) return { label: 'utf-16be', mark: 2 };
  if (head.length >= 4 && head[1] === 0 && head[3] === 0) return { label: 'utf-16le', mark: 0 };
  if (head.length >= 4 && head[0] === 0 && head[2] === 0) return { label: 'utf-16be', mark: 0 };
  const start = Buffer.from(head.subarray(0, 300)).toString('latin1');
  const declared = /^\s*<\?xml[^>]*?\sencoding\s*=\s*["']([^"']{1,60})["']/.exec(start)?.[1];
  if (declared === undefined) return { label: UTF8, mark: 0 };
  // Its declaration could be read byte by byte, so the text is not UTF-16 whatever it says.
  if (/^(utf-?16|ucs-?2|iso-10646-ucs-2|unicode)/i.test(declared)) {
    return { label: UTF8, mark: 0, warning: `The document says “${declared}” and was read as UTF-8, which it is.` };
  }
  try {
    return { label: new TextDecoder(declared).encoding, mark: 0 };
  } catch (cause) {
    if (!(cause instanceof RangeError)) throw cause;
    throw new IntakeError({
      file,
      row: 1,
      value: declared,
      message: 'the XML declaration names an encoding that is not known',
      remedy: 'Save the document as UTF-8 and declare it so',
    });
  }
}

/** The first characters of a document, for a look at what it is; wrong bytes become marks of doubt. */
export function decodeHead(head: Uint8Array): string {
  try {
    const { label, mark } = encodingOf(head, '');
    return new TextDecoder(label).decode(head.subarray(mark));
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    return Buffer.from(head).toString('latin1');
  }
}
