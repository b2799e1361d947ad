import { expect, test } from 'vitest';
import { jsonText } from '../../../lib/export/json.ts';

test('jsonText writes typed arrays as lists and missing numbers as null, at any depth', () => {
  const value = { a: Float64Array.of(1.5, Number.NaN), b: [{ c: Int32Array.of(3) }], d: [Number.NaN, 1], e: null };
  expect(jsonText(value)).toBe('{"a":[1.5,null],"b":[{"c":[3]}],"d":[null,1],"e":null}');
});

test('jsonText leaves dates and plain values to JSON', () => {
  expect(jsonText({ at: new Date(0), text: 'ü', no: undefined })).toBe('{"at":"1970-01-01T00:00:00.000Z","text":"ü"}');
});
