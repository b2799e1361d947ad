import type { Layout } from '../types.ts';
import { decodeHead } from './decode-text.ts';

export type DocumentLayout = Extract<Layout, 'waterml-2' | 'waterml-1' | 'waterml-json'>;

/** Characters at the start of a document in which its namespace must stand. */
const LOOKED_AT = 64 * 1024;

/** What document of time series the first bytes of a file begin, told by its namespace; null for anything else.
 *  An XML document that brings its own grammar (DOCTYPE) and is no web page is given to the reader of WaterML 2.0, which
 *  says why it is refused. */
export function sniffDocument(head: Uint8Array): DocumentLayout | null {
  const text = decodeHead(head.subarray(0, LOOKED_AT)).trimStart();
  if (text.startsWith('<')) {
    if (/^(?:<\?[^>]*>\s*|<!--[\s\S]*?-->\s*)*<(?:!doctype\s+)?html\b/i.test(text)) return null;
    if (text.includes('opengis.net/waterml/2.0')) return 'waterml-2';
    if (/cuahsi\.org\/waterml\/1\./i.test(text)) return 'waterml-1';
    return /^(?:<\?[^>]*>\s*|<!--[\s\S]*?-->\s*)*<!DOCTYPE/.test(text) ? 'waterml-2' : null;
  }
  if (!text.startsWith('{')) return null;
  return /timeSeriesResponse/.test(text) || /"timeSeries"\s*:/.test(text) ? 'waterml-json' : null;
}
