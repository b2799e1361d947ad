/** What browser tests need to know of the demo region, read from the site's own interface and not from names in a test. */
import { serverUrl } from './harness.ts';

export interface DemoStation {
  code: string;
  name: string;
  areaKm2: number | null;
}

export async function fetchJson(path: string): Promise<unknown> {
  const response = await fetch(serverUrl + path);
  if (!response.ok) throw new Error(`${path} answered ${response.status}`);
  return response.json();
}

/** Slug of the invented region that the server was started with. */
export async function demoRegion(): Promise<string> {
  const regions = (await fetchJson('/api/regions')) as { slug: string; invented: boolean }[];
  const demo = regions.find((region) => region.invented);
  if (!demo) throw new Error('the server has no demo region');
  return demo.slug;
}

/** Stations in the order of the ranking, unranked ones last. */
export async function demoStations(slug: string): Promise<DemoStation[]> {
  const text = await (await fetch(`${serverUrl}/api/regions/${slug}/ranking?format=csv`)).text();
  const [header, ...lines] = text.trim().split(/\r?\n/);
  const names = header.split(',');
  return lines.map((line) => {
    const cells = splitCsv(line);
    const cell = (name: string) => cells[names.indexOf(name)];
    const area = cell('drainage_area_km2');
    return { code: cell('station_code'), name: cell('station_name'), areaKm2: area === '' ? null : Number(area) };
  });
}

/** One line of CSV as RFC 4180 has it. */
function splitCsv(line: string): string[] {
  return [...`,${line}`.matchAll(/,(?:"((?:[^"]|"")*)"|([^,]*))/g)].map((match) =>
    match[1] === undefined ? match[2] : match[1].replaceAll('""', '"'),
  );
}

/** A new, empty region of its own for one test. */
export async function newRegion(name: string): Promise<string> {
  const response = await fetch(`${serverUrl}/api/regions`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ name: `${name} ${Date.now()}` }),
  });
  if (!response.ok) throw new Error(`a region could not be made: ${response.status} ${await response.text()}`);
  return ((await response.json()) as { slug: string }).slug;
}

export async function deleteRegion(slug: string): Promise<void> {
  await fetch(`${serverUrl}/api/regions/${slug}`, { method: 'DELETE' });
}
