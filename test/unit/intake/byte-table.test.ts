import { expect, test } from 'vitest';
import { ByteTable } from '../../../lib/intake/byte-table.ts';

const bytes = (text: string) => new TextEncoder().encode(text);

test('ByteTable.intern numbers different strings in order of appearance, and the same one always alike', () => {
  const table = new ByteTable();
  const text = bytes('A;B;A;;B');
  expect(table.intern(text, 0, 1)).toBe(0);
  expect(table.intern(text, 2, 3)).toBe(1);
  expect(table.intern(text, 4, 5)).toBe(0);
  expect(table.intern(text, 6, 6)).toBe(2);
  expect(table.intern(text, 7, 8)).toBe(1);
  expect(table.size).toBe(3);
});

test('ByteTable keeps 5,000 strings apart while it grows', () => {
  const table = new ByteTable();
  for (let round = 0; round < 2; round++) {
    for (let at = 0; at < 5000; at++) {
      const key = bytes(`station-${at}`);
      expect(table.intern(key, 0, key.length)).toBe(at);
    }
  }
  expect(new TextDecoder().decode(table.key(4321))).toBe('station-4321');
});

test('ByteTable keeps its keys when the block they came from is overwritten', () => {
  const table = new ByteTable();
  const block = bytes('one');
  table.intern(block, 0, 3);
  block.set(bytes('two'));
  expect(table.intern(block, 0, 3)).toBe(1);
  expect(table.intern(bytes('one'), 0, 3)).toBe(0);
});
