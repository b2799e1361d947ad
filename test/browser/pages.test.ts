import { gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, test } from 'vitest';
import { SCRIPT_LIMIT } from '../../lib/cli/setup/checks/script-size.js';
import { accessibilityProblems, expectTrouble, hydrated, newPage, serverUrl, troubleOf } from './harness.ts';

let region: string;
let station: string;
beforeAll(async () => {
  const regions = (await (await fetch(`${serverUrl}/api/regions`)).json()) as { slug: string; invented: boolean }[];
  region = regions.filter(({ invented }) => invented)[0].slug;
  const stations = await (await fetch(`${serverUrl}/api/regions/${region}/stations`)).json();
  station = stations.features[0].properties.station_code;
});

const PAGES: [string, () => string][] = [
  ['regions', () => '/'],
  ['methods', () => '/methods'],
  ['map and ranking', () => `/regions/${region}`],
  ['evidence', () => `/regions/${region}/evidence`],
  ['against a reference', () => `/regions/${region}/pair?station=${encodeURIComponent(station)}`],
  ['curves', () => `/regions/${region}/curves`],
  ['station', () => `/regions/${region}/stations/${encodeURIComponent(station)}`],
  ['records: years', () => `/regions/${region}/records`],
  ['records: findings', () => `/regions/${region}/records?show=findings`],
  ['records: common period', () => `/regions/${region}/records?show=periods`],
  ['edit a station', () => `/regions/${region}/stations/${encodeURIComponent(station)}/edit`],
  ['links between stations', () => `/regions/${region}/links`],
  ['derive a station', () => `/regions/${region}/derive`],
  ['import', () => `/regions/${region}/import`],
];

describe.each(PAGES)('the page %s', (_, pathOf) => {
  test.each(['light', 'dark'] as const)(
    'comes alive without trouble and meets WCAG 2.2 AA, %s',
    async (colorScheme) => {
      const page = await newPage(pathOf(), { colorScheme });
      await hydrated(page);
      await page.waitForLoadState('networkidle');
      // A page that is sent in pieces answers 200 before it knows that it has nothing to show.
      expect(await page.getByText(/^There is no/).count()).toBe(0);
      expect(await accessibilityProblems(page)).toEqual([]);
    },
  );
  test('is no wider than a phone of 390 pixels', async () => {
    const page = await newPage(pathOf(), { width: 390, height: 844 });
    await hydrated(page);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});

test('the map page is as tall as the window, and only its list scrolls', async () => {
  const page = await newPage(`/regions/${region}`);
  await hydrated(page);
  await page.getByRole('row').nth(5).waitFor();
  expect(await page.evaluate(() => document.documentElement.scrollHeight)).toBe(900);
});

test('the map page loads at most 300 kB of compressed script before anyone touches it', async () => {
  const page = await newPage();
  const sizes = new Map<string, Promise<number>>();
  page.on('response', (response) => {
    if (response.request().resourceType() !== 'script') return;
    sizes.set(
      response.url(),
      response.body().then((body) => gzipSync(body).length),
    );
  });
  await page.goto(`/regions/${region}`, { waitUntil: 'networkidle' });
  await hydrated(page);
  const total = (await Promise.all(sizes.values())).reduce((sum, size) => sum + size, 0);
  expect(sizes.size).toBeGreaterThan(3);
  expect(total).toBeLessThanOrEqual(SCRIPT_LIMIT);
});

test('the methods page sets its formulas, and what was simulated stands beside them', async () => {
  const page = await newPage('/methods#serial-correlation');
  await hydrated(page);
  const part = page.locator('#serial-correlation');
  expect(await part.locator('math').count()).toBe(2);
  expect(await part.locator('.katex-html').first().isVisible()).toBe(true);
  const alarms = part.getByRole('table').first();
  expect(await alarms.getByRole('row').count()).toBe(7);
  const headers = await alarms.getByRole('rowheader').allTextContents();
  expect(headers.filter((header) => header.includes('ar1-regional'))).toHaveLength(1);
});

test('the harness sees trouble: a forbidden inline script, an error, and a request to another host', async () => {
  const page = await newPage('/');
  expectTrouble(page, /^content policy: script-src/);
  expectTrouble(page, /^console: .*(Content Security Policy|ERR_FAILED)/);
  expectTrouble(page, /^thrown: made up$/);
  expectTrouble(page, /^asked another host: http:\/\/tiles\.example\//);
  const ran = await page.evaluate(async () => {
    const script = document.createElement('script');
    script.textContent = 'window.ran = true';
    document.body.append(script);
    setTimeout(() => {
      throw new Error('made up');
    });
    const image = new Image();
    image.src = 'http://tiles.example/1.png';
    await new Promise((resolve) => {
      image.onerror = resolve;
    });
    return 'ran' in window;
  });
  expect(ran).toBe(false);
  await expect.poll(() => troubleOf(page).filter((line) => /^(content policy|thrown|asked)/.test(line)).length).toBe(3);
});
