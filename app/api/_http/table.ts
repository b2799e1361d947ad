import { createHash } from 'node:crypto';
import * as z from 'zod';
import { FORMATS } from '@/lib/export/format';
import type { Narrowing } from '@/lib/export/narrow';
import { metadataName } from '@/lib/export/table-metadata';
import { attachment, taggedAnswer } from './answer';
import { narrowingParameters } from './parameters';

/** `metadata` answers the description of the CSV file: columns, units, basis, data hash, program version. */
const TABLE_FORMATS = [...FORMATS, 'metadata'] as const;
export type TableFormat = (typeof TABLE_FORMATS)[number];

export const formatParameter = {
  format: z.enum(TABLE_FORMATS).default('json').describe('csv, json, geojson, or metadata: what the CSV file means'),
};

/** Parameters that every table of a region takes beside the basis. */
export const tableParameters = { ...formatParameter, ...narrowingParameters };

interface Table {
  /** key of the result that the table shows */
  key: string;
  format: TableFormat;
  narrowing: Narrowing;
  /** name of the CSV file */
  file: string;
  product: (format: 'csv' | 'json' | 'geojson') => string;
  metadata: () => Record<string, unknown>;
}

/** Answers a table in the form asked for. A CSV file says in a Link header where its metadata is (W3C CSV on the Web). */
export function tableAnswer(request: Request, { key, format, narrowing, file, product, metadata }: Table): Response {
  const tag = createHash('sha256')
    .update(JSON.stringify([key, format, narrowing, new URL(request.url).search]))
    .digest('hex');
  if (format === 'metadata') {
    const name = metadataName(file);
    return taggedAnswer(request, { tag, type: 'metadata', headers: attachment(name) }, () =>
      JSON.stringify(metadata(), null, 2),
    );
  }
  const headers = format === 'csv' ? { ...attachment(file), link: metadataLink(request) } : {};
  return taggedAnswer(request, { tag, type: format, headers }, () => product(format));
}

function metadataLink(request: Request): string {
  const url = new URL(request.url);
  url.searchParams.set('format', 'metadata');
  return `<${url.pathname}${url.search}>; rel="describedby"; type="application/csvm+json"`;
}
