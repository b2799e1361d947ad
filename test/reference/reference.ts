/** Reads the check values of this folder: {title, source, recipe, cases: [{name, input, expected, tolerance}]}.
 *  {"$ref": "series/nile.json#/values"} stands for that stored array; null in an array of numbers is a missing value.
 *  A number passes when |got − expected| ≤ abs + rel·|expected|. */
import { readFileSync } from 'node:fs';
import { expect } from 'vitest';

export interface ReferenceCase<Input, Expected> {
  name: string;
  input: Input;
  expected: Expected;
  tolerance: Record<string, { abs: number; rel: number }>;
  origin?: string;
}

const readJson = (path: string): unknown => JSON.parse(readFileSync(new URL(path, import.meta.url), 'utf8'));

function resolve(node: unknown): unknown {
  if (Array.isArray(node)) {
    // null among numbers is a missing value; elsewhere null is an answer
    const ofNumbers = node.some((item) => typeof item === 'number');
    return node.map((item) => (item === null && ofNumbers ? Number.NaN : resolve(item)));
  }
  if (typeof node !== 'object' || node === null) return node;
  if ('$ref' in node && typeof node.$ref === 'string') {
    const [path, pointer] = node.$ref.split('#/');
    const target = (readJson(`./${path}`) as Record<string, unknown>)[pointer];
    if (target === undefined) throw new Error(`reference: ${node.$ref} points at nothing`);
    return resolve(target);
  }
  return Object.fromEntries(Object.entries(node).map(([key, value]) => [key, resolve(value)]));
}

/** All cases of a file of this folder, references resolved. */
export function referenceCases<Input, Expected>(file: string): ReferenceCase<Input, Expected>[] {
  const { cases } = readJson(`./${file}.json`) as { cases: unknown[] };
  if (!cases.length) throw new Error(`reference: ${file}.json holds no case`);
  return cases.map(resolve) as ReferenceCase<Input, Expected>[];
}

/** One case by its name. */
export function referenceCase<Input, Expected>(file: string, name: string): ReferenceCase<Input, Expected> {
  const found = referenceCases<Input, Expected>(file).find((each) => each.name === name);
  if (!found) throw new Error(`reference: ${file}.json has no case "${name}"`);
  return found;
}

/** Asserts that each named figure is the expected one within the case's tolerance; null expects NaN. */
export function expectReference(
  reference: Pick<ReferenceCase<unknown, object>, 'name' | 'expected' | 'tolerance'>,
  got: Record<string, number | ArrayLike<number>>,
): void {
  const expected = reference.expected as Record<string, unknown>;
  for (const [key, value] of Object.entries(got)) {
    if (!(key in expected)) throw new Error(`reference: ${reference.name} expects nothing of "${key}"`);
    const wanted = [expected[key]].flat();
    const figures = typeof value === 'number' ? [value] : Array.from(value);
    expect(figures.length, `${reference.name}: ${key}, how many`).toBe(wanted.length);
    const { abs, rel } = reference.tolerance[key] ?? reference.tolerance.default;
    for (const [i, figure] of figures.entries()) {
      const want = wanted[i];
      if (want === null) {
        expect(figure, `${reference.name}: ${key}`).toBeNaN();
        continue;
      }
      if (typeof want !== 'number') throw new Error(`reference: ${reference.name}: ${key} is not a number`);
      const message = `${reference.name}: ${key}[${i}] is ${figure}, expected ${want}`;
      expect(Math.abs(figure - want) <= abs + rel * Math.abs(want), message).toBe(true);
    }
  }
}
