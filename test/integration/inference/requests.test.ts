import { writeFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { runCommand } from '../cli/run-command.ts';
import { oddRegions } from './odd-regions.ts';
import { askRegion, askStation, expectSound, refusal, soundText } from './sound-answer.ts';

const place = oddRegions();
const SLUG = 'mixed';
const circle = (corners: number) =>
  Array.from({ length: corners }, (_, i) => {
    const turn = (2 * Math.PI * i) / corners;
    return `${(7.3 + Math.cos(turn)).toFixed(5)},${(50.3 + Math.sin(turn)).toFixed(5)}`;
  }).join(';');

test.each(['permutation', 'sieve'])('areas that hold nothing or everything are answered, by %s', async (method) => {
  const drawnOf = async (area: string) => {
    const query = `?method=${method}&area=${encodeURIComponent(area)}`;
    const { groups } = JSON.parse(await soundText(await askRegion(SLUG, 'regional', query), query));
    return groups.find(({ id, set }: { id: string; set: string }) => id === 'drawn' && set === 'all');
  };
  // a line through A1 (7.1, 50.1) and B2 holds what lies on it
  expect((await drawnOf('7.1,50.1;7.2,50.2;7.1,50.1')).codes.sort()).toEqual(['A1', 'B2']);
  for (const empty of ['170,-40;171,-40;171,-41', '7,50;7,50;7,50'])
    expect(await drawnOf(empty)).toMatchObject({ ranked: 0, falling: null, kendall: null });
  expect((await drawnOf(circle(60))).codes.sort()).toEqual(['A1', 'B2', 'E5', 'F6']);
});

test.each([
  ['', 'an area has 3 to 60 corners, this one has 1.'],
  ['7,50;8,51', 'an area has 3 to 60 corners, this one has 2.'],
  [circle(61), 'an area has 3 to 60 corners, this one has 61.'],
  ['400,50;8,50;8,51', 'corner 1 of the area must be longitude,latitude in degrees, not "400,50".'],
  ['7,50;8,95;8,51', 'corner 2 of the area must be longitude,latitude in degrees, not "8,95".'],
  ['7,50;8,50;NaN,51', 'corner 3 of the area must be longitude,latitude in degrees, not "NaN,51".'],
])('the area "%s" is refused with the corner and what would do', async (area, words) => {
  const query = `?area=${encodeURIComponent(area)}`;
  expect(await refusal(await askRegion(SLUG, 'regional', query))).toBe(`"area": ${words}`);
  expect(await runCommand('regional', '--region', SLUG, `--area=${area}`)).toMatchObject({
    code: 2,
    stdout: '',
    stderr: expect.stringContaining(`--area: ${words}`),
  });
});

test.each([
  ['1900', 'no usable year before it'],
  ['1990', 'no usable year before it'],
  ['2019', 'no usable year from it on'],
  ['9999', 'no usable year from it on'],
])('a break in %s lies outside the record: left out, and said so', async (year, reason) => {
  const query = `?breaks=${year}&yearStart=4`;
  const text = await soundText(await askStation(SLUG, 'A1', 'breaks', query), query);
  const { steps, leftOut } = JSON.parse(text);
  expect([steps, leftOut[0].reason]).toEqual([[], expect.stringContaining(reason)]);
  const region = JSON.parse(await soundText(await askRegion(SLUG, 'breaks', query), query));
  expect(region.summary.every(({ tested }: { tested: number }) => tested === 0)).toBe(true);
});

test('the same break twice is one break', async () => {
  const once = JSON.parse(await soundText(await askStation(SLUG, 'A1', 'breaks', '?breaks=2005'), 'once'));
  const twice = JSON.parse(await soundText(await askStation(SLUG, 'A1', 'breaks', '?breaks=2005,2005'), 'twice'));
  expect(twice.steps).toHaveLength(1);
  expect(twice).toEqual(once);
});

test.each(['', 'dam', '0', '-1', '2005.5', '1e3', '20050', 'Infinity', '2005,', eleven()])(
  'breaks "%s" are refused with the value and what would do',
  async (breaks) => {
    for (const response of [
      await askRegion(SLUG, 'breaks', `?breaks=${breaks}`),
      await askStation(SLUG, 'A1', 'breaks', `?breaks=${breaks}`),
    ]) {
      const words = await refusal(response);
      expect(words).toContain(`not "${breaks}"`);
      expect(words).toContain('first low-flow years after a break, at most 10');
    }
    expect(await runCommand('breaks', '--region', SLUG, `--breaks=${breaks}`)).toMatchObject({
      code: 2,
      stdout: '',
      stderr: expect.stringContaining(`not "${breaks}"`),
    });
  },
);

function eleven(): string {
  return Array.from({ length: 11 }, (_, i) => 1995 + i).join(',');
}

test.each([
  ['A1', 'A1', '"A1" cannot be its own reference: name other stations.'],
  ['A1', 'Q9', 'mixed has no station "Q9" to compare with.'],
  ['A1', 'B2,B2', '"B2" is named twice as reference: name it once.'],
  ['D4', '', 'No natural station shares enough usable years with "D4" to be taken by itself: name the references.'],
])('pair %s with "%s" is refused', async (code, others, words) => {
  expect(await refusal(await askStation(SLUG, code, 'pair', `?with=${others}`))).toBe(words);
  const named = others === '' ? [] : others.split(',').flatMap((one) => ['--with', one]);
  const run = await runCommand('pair', '--region', SLUG, '--station', code, ...named);
  expect(run).toMatchObject({ code: 1, stdout: '', stderr: expect.stringContaining(words) });
});

test('pair with a station of equal values, of zeros and of none: figures, or the reason in words', async () => {
  for (const [code, other, words] of [
    ['A1', 'B2', null],
    ['B2', 'E5', null],
    ['A1', 'C3', 'Weir 3 is listed under Drying'],
    ['C3', 'A1', 'Weir 3 is listed under Drying'],
    ['A1', 'D4', 'Weir 4 has no usable year'],
    ['D4', 'A1', 'Weir 4 has no usable year'],
  ] as const) {
    const text = await soundText(await askStation(SLUG, code, 'pair', `?with=${other}`), `${code} ${other}`);
    const { problem } = JSON.parse(text);
    if (words === null) expect(problem).toBe(null);
    else expect(problem).toContain(words);
    const run = await runCommand('pair', '--region', SLUG, '--station', code, '--with', other);
    expect(run.code).toBe(words === null ? 0 : 1);
    expectSound(run.stdout + run.stderr, `pair ${code} ${other}`);
  }
});

test.each([
  ['antecedentDays=many', '"antecedentDays": must be a number, not "many".'],
  ['antecedentDays=Infinity', '"antecedentDays": must be a number, not "Infinity".'],
  ['antecedentDays=0', '"antecedentDays": must be at least 1, not "0".'],
  ['antecedentDays=732', '"antecedentDays": must be at most 731, not "732".'],
  ['antecedentDays=1.5', '"antecedentDays": must be a whole number, not "1.5".'],
  ['quantity=snow', '"quantity": must be rainfall or potential-evaporation, not "snow".'],
  ['from=Q9', 'mixed holds no weather at "Q9"; it holds rainfall at A1.'],
])('weather?%s is refused with the value and what would do', async (query, words) => {
  expect(await refusal(await askStation(SLUG, 'A1', 'weather', `?${query}`))).toBe(words);
});

test.each([
  ['regional', 'method=guess', '"method": must be permutation or sieve, not "guess".'],
  ['certainty', 'k=0', '"k": must be at least 1, not "0".'],
  ['certainty', 'format=geojson', '"format": must be json, csv or metadata, not "geojson".'],
] as const)('%s?%s is refused with the value and what would do', async (route, query, words) => {
  expect(await refusal(await askRegion(SLUG, route, `?${query}`))).toBe(words);
});

test.each([
  [{ alpha: 0 }, '"alpha" cannot be 0'],
  [{ alpha: 1 }, '"alpha" cannot be 1'],
  [{ minYears: 1001 }, '"minYears" cannot be 1001'],
  [{ period: [1990, 9999] }, 'at most 500 years'],
  [{ season: [11, 2], yearStart: 1 }, 'would hold it'],
])('every command refuses the basis %j by name, with exit code 2', async (basis, words) => {
  const file = `${place.folder}/basis.json`;
  writeFileSync(file, JSON.stringify(basis));
  for (const argv of [['rank'], ['regional'], ['windows'], ['breaks'], ['pair', '--station', 'A1']]) {
    const run = await runCommand(...argv, '--region', SLUG, '--basis', file);
    expect(run).toMatchObject({ code: 2, stdout: '', stderr: expect.stringContaining(words) });
  }
});
