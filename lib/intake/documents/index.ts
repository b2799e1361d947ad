import type { FileHead } from '../file-blocks.ts';
import { type DocumentReader, readerOf } from './document-reader.ts';
import { sniffDocument } from './sniff.ts';
import { parseWaterml1 } from './waterml-1.ts';
import { parseWaterml2 } from './waterml-2.ts';
import { parseWatermlJson } from './waterml-json.ts';

export type { DocumentReader } from './document-reader.ts';

const PARSERS = { 'waterml-2': parseWaterml2, 'waterml-1': parseWaterml1, 'waterml-json': parseWatermlJson };

/** The reader for a document that begins with these bytes; null where they begin no document of time series. */
export function documentReader(head: FileHead): DocumentReader | null {
  const layout = sniffDocument(head.bytes);
  return layout === null ? null : readerOf(layout, head, PARSERS[layout]);
}
