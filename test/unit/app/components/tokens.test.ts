import { readFileSync } from 'node:fs';
import { interpolatePuOr } from 'd3-scale-chromatic';
import { expect, test } from 'vitest';

const css = readFileSync(new URL('../../../../app/tokens.css', import.meta.url), 'utf8');
const THEMES = ['light', 'dark'] as const;

/** A token's colour in a theme, as "#rrggbb". */
function token(name: string, theme: (typeof THEMES)[number]): string {
  const found = new RegExp(`--${name}: light-dark\\((#[0-9a-f]{6}), (#[0-9a-f]{6})\\)`).exec(css);
  if (!found) throw new Error(`tokens.css has no pair --${name}`);
  return found[theme === 'light' ? 1 : 2];
}

/** Contrast of two colours by WCAG 2.2, relative luminance of sRGB. */
function contrast(one: string, other: string): number {
  const luminance = (colour: string) => {
    const [red, green, blue] = [1, 3, 5]
      .map((at) => Number.parseInt(colour.slice(at, at + 2), 16) / 255)
      .map((part) => (part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4));
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
  };
  const [high, low] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (high + 0.05) / (low + 0.05);
}

test('contrast of black on white is 21 (WCAG 2.2, the definition’s upper end)', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
  // the least grey on white that passes AA, as commonly tabled
  expect(contrast('#767676', '#ffffff')).toBeCloseTo(4.54, 2);
});

const PAPERS = ['paper', 'paper-raised', 'paper-sunk', 'paper-land'];
const TEXTS = ['ink', 'ink-2', 'ink-3', 'blue', 'blue-strong', 'dry', 'wet'];
const MARKS = ['edge', 'dry-fill', 'wet-fill', 'level', 'water'];

for (const theme of THEMES) {
  test.each(TEXTS)(`--%s is readable text on every paper, 4.5:1 in the ${theme} theme`, (name) => {
    for (const paper of PAPERS) {
      expect(contrast(token(name, theme), token(paper, theme)), `on --${paper}`).toBeGreaterThanOrEqual(4.5);
    }
  });

  test.each(MARKS)(`--%s is seen as a mark on every paper, 3:1 in the ${theme} theme`, (name) => {
    for (const paper of PAPERS) {
      expect(contrast(token(name, theme), token(paper, theme)), `on --${paper}`).toBeGreaterThanOrEqual(3);
    }
  });

  test(`washes keep the text on them readable in the ${theme} theme`, () => {
    expect(contrast(token('on-blue', theme), token('blue', theme))).toBeGreaterThanOrEqual(4.5);
    for (const text of ['ink', 'ink-2', 'ink-3', 'blue', 'dry', 'wet']) {
      expect(contrast(token(text, theme), token('blue-wash', theme)), `--${text}`).toBeGreaterThanOrEqual(4.5);
    }
    expect(contrast(token('ink', theme), token('dry-wash', theme))).toBeGreaterThanOrEqual(4.5);
  });
}

test('the findings’ fills are colours of PuOr: orange for drier, violet for wetter', () => {
  const hex = (rgb: string) =>
    `#${(rgb.match(/\d+/g) ?? []).map((part) => Number(part).toString(16).padStart(2, '0')).join('')}`;
  expect(token('dry-fill', 'light')).toBe(hex(interpolatePuOr(0.9)));
  expect(token('wet-fill', 'light')).toBe(hex(interpolatePuOr(0.1)));
  expect(token('dry-fill', 'dark')).toBe(hex(interpolatePuOr(0.75)));
  expect(token('wet-fill', 'dark')).toBe(hex(interpolatePuOr(0.25)));
});
