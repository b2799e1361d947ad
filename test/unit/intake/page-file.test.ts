import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { PageFile } from '../../../lib/intake/page-file.ts';
import { emptyPage, PAGE } from '../../../lib/intake/pages.ts';

test('PageFile gives pages back as they were, uses the slots of dropped ones again, and leaves no file', () => {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-pages-test-'));
  const file = new PageFile(join(folder, 'pages'));
  expect(existsSync(join(folder, 'pages'))).toBe(false);
  const pageOf = (seed: number) => {
    const page = emptyPage();
    for (let at = 0; at < PAGE; at++) page.values[at] = at % 7 === seed ? Number.NaN : seed / (at + 1);
    return { ...page, codes: page.codes.fill(seed) };
  };
  const places = [1, 2, 3].map((seed) => file.write(pageOf(seed)));
  expect(
    places.map((place, at) =>
      file.read(place, emptyPage()).values.every((v, i) => Object.is(v, pageOf(at + 1).values[i])),
    ),
  ).toEqual([true, true, true]);
  file.drop(places[1]);
  expect(file.write(pageOf(4))).toEqual(places[1]);
  expect(file.read(places[1], emptyPage()).codes[PAGE - 1]).toBe(4);
  expect(file.read(places[2], emptyPage()).codes[0]).toBe(3);
  file.close();
  expect(readdirSync(folder)).toEqual([]);
  rmSync(folder, { recursive: true });
});
