import { expect, test } from 'vitest';
import { getStation } from '../../../lib/store/stations.ts';
import { OPEN_FILES, OPEN_LISTS } from './open-files.ts';
import { importOne, refusalOf, registeredRegion, storedDays } from './registered-region.ts';

/** What cannot be known is asked: the file is refused and changes nothing, and with the answer it is taken. */
const place = registeredRegion();

test.each(OPEN_FILES)('$what: asked for, then taken', async ({ file, content, asks, answer, stored }) => {
  const before = new Map<string, Record<string, number>>();
  for (const code of Object.keys(stored)) before.set(code, await storedDays(place, code));
  const { problem } = await refusalOf(place, file, content);
  expect([problem?.needs, problem?.row, problem?.value]).toEqual(asks);
  const { problems, taken } = await importOne(place, file, content, answer);
  expect(problems).toEqual([]);
  expect(taken.map((one) => one.file)).toEqual([file]);
  for (const [code, days] of Object.entries(stored))
    expect(await storedDays(place, code)).toEqual({ ...before.get(code), ...days });
});

test.each(OPEN_LISTS)('a list of stations with $what: asked for, then taken', async (one) => {
  const { file, content, asks, answer, code, facts } = one;
  const { problem } = await refusalOf(place, file, content);
  expect([problem?.needs, problem?.row, problem?.value]).toEqual(asks);
  expect((await importOne(place, file, content, answer)).problems).toEqual([]);
  expect(await getStation(place.region.id, code)).toMatchObject(facts);
});

const HEADER = 'station,date,discharge_m3s\n';

test('days unlike those that stand: asked for with their number, then taken by the rule', async () => {
  await importOne(place, 'old.csv', `${HEADER}A1,2004-01-01,1\nA1,2004-01-02,2\n`);
  const text = `${HEADER}A1,2004-01-02,4\nA1,2004-01-03,3\n`;
  const { problem, revisions } = await refusalOf(place, 'new.csv', text);
  expect([problem?.needs, revisions?.unlike]).toEqual(['revise', 1]);
  expect((await importOne(place, 'new.csv', text, {}, { rule: 'take-new' })).problems).toEqual([]);
  expect(await storedDays(place, 'A1')).toMatchObject({ '2004-01-01': 1, '2004-01-02': 4, '2004-01-03': 3 });
});
