import { SaxesParser } from 'saxes';
import { IntakeError } from '../types.ts';
import { CHECK_DOCUMENT, DEEPEST, LONGEST_PIECE } from './limits.ts';
import { documentText, type TextReading } from './read-text.ts';

const TOO_LONG = `a tag or a text is longer than ${LONGEST_PIECE / 1024} kB`;

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
  const refuse: Refuse = (message, remedy, value) => {
    throw new IntakeError({
      ...{ file, row: parser.line, message, remedy },
      ...(value === undefined ? {} : { value: value.slice(0, 100) }),
    });
  };
  parser.on('doctype', (doctype) => refuseDoctype(doctype, refuse));
  parser.on('error', ({ message }) => refuseBroken(message, refuse));
  const elements = tellElements(parser, handler, refuse);
  for await (const piece of pieces) {
    elements.silent += piece.length;
    parser.write(piece);
    if (elements.silent > LONGEST_PIECE) refuse(TOO_LONG, CHECK_DOCUMENT);
    if (handler.enough?.()) return;
  }
  parser.close();
}

type Refuse = (message: string, remedy: string, value?: string) => never;

/** @returns `silent`: characters read since something was heard, to be counted up from outside */
function tellElements(parser: SaxesParser, handler: ElementHandler, refuse: Refuse): { silent: number } {
  const heard = { silent: 0 };
  const names = new Map<string, string>();
  let depth = 0;
  let text = '';
  parser.on('opentag', ({ name, attributes }) => {
    heard.silent = 0;
    if (++depth > DEEPEST) refuse(`elements stand more than ${DEEPEST} deep in one another`, CHECK_DOCUMENT);
    text = '';
    handler.open(localName(name, names), attributes, parser.line);
  });
  const addText = (piece: string) => {
    heard.silent = 0;
    text += piece;
    // Comments between them may have parted endless pieces.
    if (text.length > LONGEST_PIECE) refuse(TOO_LONG, CHECK_DOCUMENT);
  };
  parser.on('text', addText);
  parser.on('cdata', addText);
  const passOver = () => {
    heard.silent = 0;
  };
  parser.on('comment', passOver);
  parser.on('processinginstruction', passOver);
  parser.on('closetag', ({ name }) => {
    heard.silent = 0;
    depth--;
    const content = text;
    text = '';
    handler.close(localName(name, names), content, parser.line);
  });
  return heard;
}

function refuseDoctype(doctype: string, refuse: Refuse): never {
  const entities = /<!ENTITY/i.test(doctype);
  return refuse(
    entities
      ? 'the document declares entities of its own (DOCTYPE), which are never expanded'
      : 'the document has a DOCTYPE, which documents of time series do not have',
    'Get it without the DOCTYPE',
    doctype.trim(),
  );
}

function refuseBroken(message: string, refuse: Refuse): never {
  const reason = message.replace(/^\d+:\d+: /, '').replace(/\.$/, '');
  const cut = /unclosed tag|document must contain a root element|unexpected end/.test(reason);
  return refuse(
    `the document ${cut ? 'is cut short' : 'is not well-formed XML'} (${reason})`,
    cut ? 'Get it again, whole' : 'Get it again; it is damaged',
  );
}

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
