import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { SERIAL_CORRECTIONS } from '../../../lib/basis.ts';
import { METHOD_CHAPTERS } from '../../../lib/region/methods/all.ts';
import { METHODS_VERSION } from '../../../lib/region/methods-version.ts';
import { CLAIM_WORDS, falseAlarmsOf, SIMULATED } from '../../../lib/region/simulated-figures.ts';

const methods = METHOD_CHAPTERS.flatMap((chapter) => chapter.methods);

describe('METHOD_CHAPTERS', () => {
  test('has each id once, fit for an address', () => {
    const ids = methods.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^[a-z]+(-[a-z]+)*$/);
  });

  test.each(methods.map((method) => [method.id, method] as const))(
    '%s says what it does, when not to trust it, and whose it is',
    (_, method) => {
      expect(method.says.length).toBeGreaterThan(0);
      expect(method.distrust.length + method.assumes.length).toBeGreaterThan(0);
      expect(method.sources.length).toBeGreaterThan(0);
    },
  );

  test.each(methods.flatMap(({ id, formulas }) => formulas.map(({ tex }) => [id, tex] as const)))(
    'a formula of %s can be set',
    (_, tex) => {
      expect(katex.renderToString(tex, { throwOnError: true, strict: 'error' })).toContain('<math');
    },
  );

  test('speaks only of claims that are simulated and have words', () => {
    const known = new Set(SIMULATED.figures.map(({ claim }) => claim));
    for (const claim of methods.flatMap(({ simulated = [] }) => simulated)) {
      expect(known).toContain(claim);
      expect(CLAIM_WORDS).toHaveProperty(claim);
    }
  });
});

test('the simulated figures are those of this methods version, and every serial correction has its false alarms', () => {
  expect(SIMULATED.methodsVersion).toBe(METHODS_VERSION);
  for (const correction of SERIAL_CORRECTIONS) expect(falseAlarmsOf(correction)).toHaveLength(3);
});
