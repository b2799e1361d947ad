import { afterAll, beforeAll, expect, test } from 'vitest';
import type { FindingRow, MarkView } from '../../lib/jobs/records-types.ts';
import { deleteRegion, fetchJson } from './demo-region.ts';
import { hydrated, newPage } from './harness.ts';
import { flowLines, regionWithFlows } from './records-region.ts';

const FLAT = ['2010-07-01', '2010-07-20'] as const;
const JUMPS = ['2012-05-05', '2014-06-06'];

let slug: string;

beforeAll(async () => {
  // a flat run and two spikes of a day at A1, nothing wrong at B2
  const wrong = flowLines('A1', '2005-01-01', '2016-12-31', (iso, flow) => {
    if (iso >= FLAT[0] && iso <= FLAT[1]) return 1.25;
    return JUMPS.includes(iso) ? flow * 400 : flow;
  });
  const registry = ['A1,Lom at the weir,Lom,120', 'B2,Obir below,Obir,80'];
  slug = await regionWithFlows('Marks', [...wrong, ...flowLines('B2', '2005-01-01', '2016-12-31')], registry);
});

afterAll(() => deleteRegion(slug));

const findings = async () =>
  ((await fetchJson(`/api/regions/${slug}/findings`)) as { findings: FindingRow[] }).findings;
const marks = async (code: string) =>
  ((await fetchJson(`/api/regions/${slug}/stations/${code}/marks`)) as { marks: MarkView[] }).marks;
const flagsOf = async (code: string, day: string) => {
  const { flags } = (await fetchJson(`/api/regions/${slug}/stations/${code}/days?first=${day}&last=${day}`)) as {
    flags: number[];
  };
  return flags[0];
};

async function open(query: string) {
  const page = await newPage(`/regions/${slug}/records${query}`);
  await hydrated(page);
  return page;
}

test('what the checks found is listed by station, drawn, and filtered by kind and by what was answered', async () => {
  const page = await open('?show=findings');
  const station = page.getByRole('region', { name: 'Findings at Lom at the weir' });
  await station.getByText('Flat run', { exact: true }).waitFor();
  expect(await station.getByRole('link', { name: FLAT.join(' to ') }).count()).toBe(1);
  expect(await page.getByRole('region', { name: 'Findings at Obir below' }).count()).toBe(0);
  const ink = () =>
    station
      .locator('canvas')
      .first()
      .evaluate((canvas: HTMLCanvasElement) => {
        const { data } = canvas.getContext('2d')!.getImageData(0, 0, canvas.width, canvas.height);
        return data.filter((value, at) => at % 4 === 3 && value > 0).length;
      });
  await expect.poll(ink).toBeGreaterThan(500);
  await page.getByLabel('Kind').selectOption('jump');
  await expect.poll(() => station.getByText('Flat run', { exact: true }).count()).toBe(0);
  expect(new URL(page.url()).searchParams.get('kind')).toBe('jump');
  await page.getByLabel('Answered').selectOption('rejected');
  await page.getByRole('heading', { name: 'No finding answers the filter' }).waitFor();
});

test('a finding is rejected with a reason, its days count as missing, and the undo brings them back', async () => {
  expect(await flagsOf('A1', '2010-07-05')).toBe(16);
  const page = await open('?show=findings&kind=flat');
  await page.getByRole('button', { name: `Reject flat run of ${FLAT[0]}` }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('button', { name: 'Reject' }).click();
  expect(await marks('A1'), 'nothing is marked without a reason').toEqual([]);
  await dialog.getByLabel('Reason').fill('float stuck');
  await dialog.getByLabel('By').fill('A. Hydrologist');
  await page.keyboard.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  await page.getByText(/1 rejected/).waitFor();
  expect((await flagsOf('A1', '2010-07-05')) & 32).toBe(32);
  expect(await marks('A1')).toMatchObject([
    { kind: 'reject', first: FLAT[0], last: FLAT[1], reason: 'float stuck', by: 'A. Hydrologist' },
  ]);
  await page.getByText('Marks on this record').click();
  await page.getByRole('button', { name: `Undo: rejected ${FLAT[0]} to ${FLAT[1]}` }).click();
  await page.getByText(/0 rejected/).waitFor();
  expect(await marks('A1')).toEqual([]);
  expect(await flagsOf('A1', '2010-07-05')).toBe(16);
});

test('all findings of a kind at a station are accepted at once', async () => {
  const jumps = (await findings()).filter(({ kind }) => kind === 'jump');
  expect(jumps.length).toBeGreaterThan(1);
  const page = await open('?show=findings&kind=jump');
  const asked: string[] = [];
  page.on('request', (request) => {
    if (request.method() === 'POST') asked.push(new URL(request.url()).pathname);
  });
  await page.getByRole('button', { name: `Accept all ${jumps.length}: jump from day to day` }).click();
  await page.getByRole('dialog').getByLabel('Reason').fill('cloudbursts');
  await page.getByRole('dialog').getByRole('button', { name: 'Accept' }).click();
  await page.getByText(new RegExp(`${jumps.length} accepted`)).waitFor();
  expect((await findings()).filter(({ state }) => state === 'accepted').length).toBe(jumps.length);
  expect(await flagsOf('A1', JUMPS[0])).toBe(0);
  expect(asked, 'all in one request').toEqual([`/api/regions/${slug}/stations/A1/marks`]);
});

test('a finding has a link of its own, from the year’s panel to its place in the list', async () => {
  const page = await open(`?station=A1&year=${new Date(FLAT[0]).getUTCFullYear()}`);
  await page
    .getByRole('region', { name: /^Lom at the weir/ })
    .getByRole('link', { name: 'Flat run' })
    .click();
  const led = page.locator('li[aria-current]');
  await led.getByText('Flat run', { exact: true }).waitFor();
  expect(new URL(page.url()).searchParams.get('finding')).toBe(`flat:${FLAT[0]}`);
  expect(await led.getByRole('link', { name: FLAT.join(' to ') }).count()).toBe(1);
});

test('days chosen freely are noted, then rejected, from the year’s panel; the chart counts them', async () => {
  const page = await open('?station=B2&year=2008');
  const form = page.getByRole('form', { name: 'Mark days' });
  await form.getByLabel('From').fill('2008-06-10');
  await form.getByLabel('To').fill('2008-06-19');
  await form.getByLabel('Reason').fill('weir cleaned');
  await form.getByRole('radio', { name: 'Note' }).check();
  await form.getByRole('button', { name: 'Note these days' }).click();
  await page.getByText(/2008-06-10 to 2008-06-19 noted/).waitFor();
  expect(await flagsOf('B2', '2008-06-10')).toBe(0);
  await form.getByRole('radio', { name: 'Reject' }).check();
  await form.getByLabel('Reason').fill('stage board gone');
  await form.getByRole('button', { name: 'Reject these days' }).click();
  await page.getByText(/10 rejected/).waitFor();
  expect(await flagsOf('B2', '2008-06-19')).toBe(32);
  expect(await flagsOf('B2', '2008-06-20')).toBe(0);
  await page.getByRole('button', { name: 'Undo: rejected 2008-06-10 to 2008-06-19' }).click();
  await page.getByText(/10 rejected/).waitFor({ state: 'detached' });
  expect(await flagsOf('B2', '2008-06-19')).toBe(0);
});

test('a drag over the hydrograph chooses the days of the form', async () => {
  const page = await open('?station=B2&year=2009');
  const figure = page.getByRole('application', { name: /^Daily flows of Obir below/ });
  await figure.waitFor();
  await figure.scrollIntoViewIfNeeded();
  const box = (await figure.boundingBox())!;
  await page.mouse.move(box.x + box.width * 0.4, box.y + 80);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width * 0.5, box.y + 90, { steps: 5 });
  await page.mouse.up();
  const form = page.getByRole('form', { name: 'Mark days' });
  const [from, to] = [await form.getByLabel('From').inputValue(), await form.getByLabel('To').inputValue()];
  const days = (Date.parse(to) - Date.parse(from)) / 86_400_000;
  // a tenth of the figure, of which the plot takes most
  expect(days).toBeGreaterThan(30);
  expect(days).toBeLessThan(50);
});

test('checking again runs as a job and says how many findings there are', async () => {
  const page = await open('?show=findings');
  await page.getByRole('button', { name: 'Check again' }).click();
  await page.getByText(/^Checked 2 stations: \d+ findings?\.$/).waitFor();
});

test('findings come as a file', async () => {
  const page = await open('?show=findings');
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Findings CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  const [header, ...lines] = text.trim().split('\r\n');
  expect(header.split(',').slice(0, 2)).toEqual(['station_code', 'quantity']);
  expect(lines.length).toBe((await findings()).length);
});
