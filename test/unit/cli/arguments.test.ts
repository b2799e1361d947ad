import { describe, expect, test } from 'vitest';
import { BasisError } from '../../../lib/basis.ts';
import { readArguments, wholeNumber } from '../../../lib/cli/arguments.ts';
import { isUsageError, UsageError } from '../../../lib/cli/usage-error.ts';

const OPTIONS = { region: { type: 'string' }, revise: { type: 'boolean', default: false } } as const;

describe('readArguments', () => {
  test('gives options and operands in any order', () => {
    const { values, positionals } = readArguments(['a.csv', '--region', 'Upper', 'b.csv', '--revise'], OPTIONS, {
      name: 'FLOWFILE',
      min: 1,
    });
    expect(values).toEqual({ region: 'Upper', revise: true });
    expect(positionals).toEqual(['a.csv', 'b.csv']);
  });
  test('takes what follows -- as operands', () => {
    expect(readArguments(['--', '--odd-name.csv'], OPTIONS, { name: 'FLOWFILE' }).positionals).toEqual([
      '--odd-name.csv',
    ]);
  });
  test.each([
    [['--regoin', 'Upper'], /--regoin.*The options are --region, --revise\./],
    [['--region'], /--region.*The options are/],
    [['--revise=yes'], /--revise/],
    [['stray.csv'], /"stray.csv" is one word too many\./],
  ])('refuses %j by name', (argv, message) => {
    expect(() => readArguments(argv, OPTIONS)).toThrow(UsageError);
    expect(() => readArguments(argv, OPTIONS)).toThrow(message);
  });
  test('counts operands: one too few and one too many are refused, the right number is not', () => {
    const read = (...argv: string[]) => readArguments(argv, {}, { name: 'FILE', min: 1, max: 1 });
    expect(() => read()).toThrow('Give FILE.');
    expect(read('a').positionals).toEqual(['a']);
    expect(() => read('a', 'b')).toThrow('"b" is one word too many: give 1 FILE.');
  });
});

test('wholeNumber takes its bounds and nothing beyond them, no fraction and no empty text', () => {
  expect(wholeNumber('--port', '0', 0, 65535)).toBe(0);
  expect(wholeNumber('--port', '65535', 0, 65535)).toBe(65535);
  for (const text of ['-1', '65536', '80.5', '', ' ', 'http', 'NaN']) {
    expect(() => wholeNumber('--port', text, 0, 65535), text).toThrow(UsageError);
  }
});

test('isUsageError knows wrong words and refused bases from failures', () => {
  expect(isUsageError(new UsageError('x'))).toBe(true);
  expect(isUsageError(new BasisError('x'))).toBe(true);
  expect(isUsageError(new TypeError('x'))).toBe(false);
  expect(isUsageError(new Error('x'))).toBe(false);
  expect(isUsageError('x')).toBe(false);
});
