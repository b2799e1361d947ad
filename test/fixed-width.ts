import type { Mapping } from '../lib/intake/types.ts';

/** Year, month and day at the first eight characters, as in `19480101`. */
export const DATE_AT_START: Mapping['date'] = {
  columns: [
    [0, 4],
    [4, 6],
    [6, 8],
  ],
  order: 'ymd',
};

/** A whole mapping of rows at fixed characters. */
export const FIXED_WIDTH: Mapping = {
  layout: 'fixed-width',
  station: { from: 'file-name' },
  date: DATE_AT_START,
  value: { slice: [28, 38] },
  flag: null,
  unit: 'mm/d',
  missing: [],
  decimal: '.',
};
