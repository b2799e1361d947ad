import { beforeAll, expect, test } from 'vitest';
import { deleteRegion, demoRegion, newRegion } from './demo-region.ts';
import { expectTrouble, hydrated, newPage } from './harness.ts';
import { flowLines, regionWithFlows } from './records-region.ts';

let slug: string;
beforeAll(async () => {
  slug = await demoRegion();
});

test('a region without stations says what to bring', async () => {
  const empty = await newRegion('Evidence of nothing');
  const page = await newPage(`/regions/${empty}/evidence`);
  await page.getByRole('heading', { name: /has no stations yet/ }).waitFor();
  await deleteRegion(empty);
});

test('one station: every section speaks, of the one', async () => {
  const one = await regionWithFlows('Evidence of one', flowLines('A', '1980-01-01', '2009-12-31'));
  const page = await newPage(`/regions/${one}/evidence`);
  await page.locator('#terms').getByRole('table').waitFor();
  expect(await page.locator('[data-answer="chance"] dd').textContent()).toMatch(/1 station/);
  expect(await page.locator('[data-answer="years"] dd').textContent()).toMatch(/windows of at least 15 usable years/);
  expect(await page.locator('#breaks').textContent()).toContain('No ranked station has a dated change');
  await deleteRegion(one);
});

test('a station that is too short to be ranked: the page says so and does not fail', async () => {
  const short = await regionWithFlows('Evidence of little', flowLines('A', '2001-01-01', '2006-12-31'));
  const page = await newPage(`/regions/${short}/evidence`);
  await page.locator('#terms').getByRole('table').waitFor();
  expect(await page.locator('#years').textContent()).toContain('No ranked station has 15 usable years');
  expect(await page.locator('[data-answer="chance"] dd').textContent()).toContain('nothing can be said');
  await deleteRegion(short);
});

test('long work is followed with its share, can be cancelled, and computed after all', async () => {
  const page = await newPage();
  let state: 'running' | 'cancelled' | 'done' = 'running';
  let asked = 0;
  await page.route('**/api/regions/*/regional*', async (route) => {
    asked += 1;
    if (state === 'done') return route.fallback();
    await route.fulfill({ status: 202, json: { job: 'far-away', state, progress: { share: 0 } } });
  });
  const job = () => ({ id: 'far-away', kind: 'regional', state, error: null, result: null, progress: { share: 0.25 } });
  await page.route('**/api/jobs/far-away/events', (route) =>
    route.fulfill({
      headers: { 'content-type': 'text/event-stream' },
      body: `retry: 100\n\nid: 1\nevent: job\ndata: ${JSON.stringify(job())}\n\n`,
    }),
  );
  await page.route('**/api/jobs/far-away', async (route) => {
    if (route.request().method() === 'DELETE') state = 'cancelled';
    await route.fulfill({ json: job() });
  });
  await page.goto(`/regions/${slug}/evidence`);
  await hydrated(page);
  const bar = page.locator('#chance').getByRole('progressbar', { name: 'Playing the years again' });
  await bar.waitFor();
  await expect.poll(() => bar.evaluate((element) => (element as HTMLProgressElement).value)).toBe(0.25);
  expect(await page.locator('[data-answer="chance"] dd').textContent()).toBe('Playing the years again…');
  await page.locator('#chance').getByRole('button', { name: 'Cancel' }).click();
  await page.locator('#chance').getByText('Playing the years again: cancelled.').waitFor();
  // what comes after does not wait for what was given up
  await page.locator('#years').getByRole('application').waitFor();
  const before = asked;
  state = 'done';
  await page.locator('#chance').getByRole('button', { name: 'Compute it after all' }).click();
  await page.locator('#chance').getByRole('table').first().waitFor();
  expect(asked).toBe(before + 1);
});

test('a server that cannot answer is told in its words, and asked again on demand', async () => {
  const page = await newPage();
  expectTrouble(page, /503/);
  let fails = true;
  await page.route('**/api/regions/*/start-end*', (route) =>
    fails ? route.fulfill({ status: 503, json: { detail: 'Busy with another import. Ask again.' } }) : route.fallback(),
  );
  await page.goto(`/regions/${slug}/evidence`);
  await hydrated(page);
  const note = page.locator('#years').getByRole('alert');
  await expect.poll(() => note.textContent()).toContain('Busy with another import. Ask again.');
  fails = false;
  await note.getByRole('button', { name: 'Try again' }).click();
  await page.locator('#years').getByRole('application').waitFor();
});

test('one section is printed alone, unfolded, and the page is whole again after', async () => {
  const page = await newPage(`/regions/${slug}/evidence`);
  await hydrated(page);
  await page.locator('#breaks').getByRole('table').waitFor();
  await page.evaluate(() => {
    window.print = () => {
      window.dispatchEvent(new Event('beforeprint'));
      const sections = [...document.querySelectorAll<HTMLElement>('[data-section]')];
      document.title = JSON.stringify({
        shown: sections.filter((section) => !('leftOut' in section.dataset)).map((section) => section.dataset.section),
        open: [...document.querySelectorAll<HTMLDetailsElement>('details[data-open-in-print]')].every(
          ({ open }) => open,
        ),
      });
      window.dispatchEvent(new Event('afterprint'));
    };
  });
  await page.getByRole('button', { name: 'Print “Before and after” alone' }).click();
  await expect.poll(async () => JSON.parse(await page.title())).toEqual({ shown: ['breaks'], open: true });
  expect(await page.locator('[data-left-out]').count()).toBe(0);
  await page.emulateMedia({ media: 'print' });
  expect(await page.locator('#breaks').getByRole('button', { name: 'Add the break' }).isVisible()).toBe(false);
  expect(await page.locator('[data-answer="chance"] dd').isVisible()).toBe(true);
});

test('on a sheet of A4 no table is cut off', async () => {
  // 210 mm less margins of 10 mm, at 96 to the inch
  const page = await newPage(`/regions/${slug}/evidence?breaks=2000`, { width: 718, height: 1000 });
  await hydrated(page);
  await page.locator('#terms').getByRole('table').waitFor();
  await page.emulateMedia({ media: 'print' });
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(718);
});

test('a chart that is dark on the screen is drawn for paper when the page is printed', async () => {
  const chart = async (colorScheme: 'light' | 'dark') => {
    const page = await newPage(`/regions/${slug}/evidence`, { colorScheme });
    await hydrated(page);
    const canvas = page.locator('#years canvas');
    await canvas.waitFor();
    await page.locator('#breaks').getByRole('table').waitFor();
    const picture = () => canvas.evaluate((element) => (element as HTMLCanvasElement).toDataURL());
    return { page, picture };
  };
  const light = await (await chart('light')).picture();
  const { page, picture } = await chart('dark');
  const dark = await picture();
  expect(dark).not.toBe(light);
  // both in one task, as a browser does it: no frame is drawn between
  const printed = await page.evaluate(() => {
    window.dispatchEvent(new Event('beforeprint'));
    const canvas = document.querySelector<HTMLCanvasElement>('#years canvas');
    const url = canvas?.toDataURL();
    window.dispatchEvent(new Event('afterprint'));
    return url;
  });
  expect(printed).toBe(light);
  await expect.poll(picture).toBe(dark);
});
