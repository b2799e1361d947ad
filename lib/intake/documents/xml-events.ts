import { SaxesParser } from 'saxes';
import { IntakeError } from '../types.ts';
import { documentText, type TextReading } from './read-text.ts';

/** Levels of elements within one another, and characters of one tag or text, beyond which a document is no set of
 *  time series but a means to fill the memory. */
const DEEPEST = 200;
const LONGEST_PIECE = 1 << 20;

export type Attributes = Record<string, string>;

/** Hears of the elements of a document as they come. Names are without their prefix. */
export interface ElementHandler {
  open(name: string, attributes: Attributes, row: number): void;
  /** @param text  what stood directly in the element after its last child */
  close(name: string, text: string, row: number): void;
  /** true: what is needed is known, the rest need not be read */
  enough?(): boolean;
}

/** Reads an XML document in pieces and tells its elements. Entities of its own are never expanded: a document that
 *  brings a DOCTYPE is refused, and so is one that is not well-formed, too deep, or has endless tags or texts.
 *  @throws IntakeError with the row; the signal's reason when aborted */
export function readXml(path: string, reading: TextReading, handler: ElementHandler): Promise<void> {
  return parseXml(documentText(path, reading), reading.file, handler);
}

/** The same of text that is there already in pieces. */
export async function parseXml(pieces: AsyncIterable<string>, file: string, handler: ElementHandler): Promise<void> {
  const parser = new SaxesParser({ xmlns: false });
  const refuse = (message: string, remedy: string, value?: string): never => {
    throw new IntakeError({
      ...{ file, row: parser.line, message, remedy },
      ...(value === undefined ? {} : { value: value.slice(0, 100) }),
    });
  };
  let depth = 0;
  let text = '';
  /** characters read since something was heard */
  let silent = 0;
  const names = new Map<string, string>();
  const heard = () => {
    silent = 0;
  };
  parser.on('doctype', (doctype) => {
    const entities = /<!ENTITY/i.test(doctype);
    refuse(
      entities
        ? 'the document declares entities of its own (DOCTYPE), which are never expanded'
        : 'the document has a DOCTYPE, which documents of time series do not have',
      'Get it without the DOCTYPE',
      doctype.trim(),
    );
  });
  parser.on('opentag', ({ name, attributes }) => {
    silent = 0;
    if (++depth > DEEPEST) {
      refuse(`elements stand more than ${DEEPEST} deep in one another`, 'Check that it is a document of time series');
    }
    text = '';
    handler.open(localName(name, names), attributes, parser.line);
  });
  parser.on('text', (piece) => {
    silent = 0;
    text += piece;
    // Comments between them may have parted endless pieces.
    if (text.length > LONGEST_PIECE) refuse(TOO_LONG, CHECK);
  });
  parser.on('cdata', (piece) => {
    silent = 0;
    text += piece;
    if (text.length > LONGEST_PIECE) refuse(TOO_LONG, CHECK);
  });
  parser.on('comment', heard);
  parser.on('processinginstruction', heard);
  parser.on('closetag', ({ name }) => {
    silent = 0;
    depth--;
    const content = text;
    text = '';
    handler.close(localName(name, names), content, parser.line);
  });
  parser.on('error', ({ message }) => {
    const reason = message.replace(/^\d+:\d+: /, '').replace(/\.$/, '');
    const cut = /unclosed tag|document must contain a root element|unexpected end/.test(reason);
    refuse(
      `the document ${cut ? 'is cut short' : 'is not well-formed XML'} (${reason})`,
      cut ? 'Get it again, whole' : 'Get it again; it is damaged',
    );
  });
  for await (const piece of pieces) {
    silent += piece.length;
    parser.write(piece);
    if (silent > LONGEST_PIECE) refuse(TOO_LONG, CHECK);
    if (handler.enough?.()) return;
  }
  parser.close();
}

const TOO_LONG = `a tag or a text is longer than ${LONGEST_PIECE / 1024} kB`;
const CHECK = 'Check that it is a document of time series';

function localName(name: string, known: Map<string, string>): string {
  const local = known.get(name);
  if (local !== undefined) return local;
  const found = name.slice(name.indexOf(':') + 1);
  // A document with endlessly many names must not fill the memory with them.
  if (known.size < 1000) known.set(name, found);
  return found;
}

/** An attribute by its name without prefix; empty where there is none. */
export function attribute(attributes: Attributes, local: string): string {
  for (const name in attributes) {
    if (name === local || (name.endsWith(local) && name[name.length - local.length - 1] === ':')) {
      return attributes[name].trim();
    }
  }
  return '';
}
