import * as z from 'zod';
import { tableAnswer } from './table';

const PLAIN_FORMATS = ['json', 'csv', 'metadata'] as const;
type PlainFormat = (typeof PLAIN_FORMATS)[number];

/** For tables whose rows are no places: there is no GeoJSON of them. */
export const plainFormatParameter = {
  format: z.enum(PLAIN_FORMATS).default('json').describe('json, csv, or metadata: what the CSV file means'),
};

interface PlainTable {
  /** key of the result that the table shows */
  key: string;
  format: PlainFormat;
  /** name of the CSV file */
  file: string;
  product: (format: 'csv' | 'json') => string;
  metadata: () => Record<string, unknown>;
}

/** Answers such a table in the form asked for, as `tableAnswer` does others. */
export function plainTableAnswer(request: Request, { product, ...table }: PlainTable): Response {
  return tableAnswer(request, {
    ...table,
    narrowing: {},
    product: (format) => product(format === 'csv' ? 'csv' : 'json'),
  });
}
