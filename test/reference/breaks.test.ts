import { expect, test } from 'vitest';
import { DEFAULT_BASIS, type ResolvedBasis } from '../../lib/basis.ts';
import { chosenBreaks } from '../../lib/region/known-breaks.ts';
import { stationBreaks } from '../../lib/region/station-breaks.ts';
import { suggestedBreak } from '../../lib/region/suggested-break.ts';
import { expectReference, referenceCases } from './reference.ts';

type Input = { years: number[]; values: number[]; year: number };

const BASIS: ResolvedBasis = {
  ...DEFAULT_BASIS,
  serialCorrection: 'none',
  period: null,
  yearStart: 1,
  asked: { period: null, yearStart: 1 },
};
const CASES = referenceCases<Input, object>('breaks');
const rowOf = ({ years, values }: Input) => ({
  ...{ code: 'R', name: 'Nile', years, values, trendOf: 'minima' as const, trend: 'none' as const },
  ...{ r1: null, serialFactor: 1, unrankedReason: null },
});

for (const reference of CASES) {
  test(`stationBreaks gives levels, difference and test of ${reference.name}`, () => {
    const { input } = reference;
    const { steps } = stationBreaks(rowOf(input), BASIS, chosenBreaks([input.year], 1));
    const [{ before, after, difference, percent, z, p }] = steps;
    expectReference(reference, {
      yearsBefore: before.years,
      yearsAfter: after.years,
      medianBefore: before.median!,
      medianAfter: after.median!,
      difference: difference!,
      percent: percent!,
      z: z!,
      p: p!,
    });
  });
}

test('suggestedBreak: the Nile’s figures part after 1898 (Cobb 1978, Biometrika 65:243–251)', () => {
  expect(suggestedBreak(rowOf(CASES[0].input), BASIS)?.lastBefore).toBe(1898);
});
