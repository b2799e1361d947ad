import { expect, test } from 'vitest';
import { sizeText } from '@/app/components/import/size-text';

test('sizeText rounds to what is read at a glance', () => {
  expect([0, 999, 1000, 1_234_567, 999_499, 999_500, 1.2e9].map(sizeText)).toEqual([
    '0 bytes',
    '999 bytes',
    '1.0 kB',
    '1.2 MB',
    '999 kB',
    '1.0 MB',
    '1.2 GB',
  ]);
});
