/** A region of its own for one test of the Records page, with flows that the test makes. */
import { expect, vi } from 'vitest';
import { newRegion } from './demo-region.ts';
import { serverUrl } from './harness.ts';

export const DAY_MS = 86_400_000;
export const isoOf = (day: number): string => new Date(day * DAY_MS).toISOString().slice(0, 10);
export const dayOf = (iso: string): number => Date.parse(iso) / DAY_MS;

/** Daily flows that no check has anything against: a yearly wave with a ripple that never repeats.
 *  @param change  another value for a day, or null for none */
export function flowLines(
  code: string,
  first: string,
  last: string,
  change: (iso: string, flow: number) => number | null = (_, flow) => flow,
): string[] {
  const lines: string[] = [];
  for (let day = dayOf(first); day <= dayOf(last); day++) {
    const wave = 3 + 2 * Math.cos((2 * Math.PI * (day % 365.25)) / 365.25);
    const flow = change(isoOf(day), wave + 0.3 * Math.sin(day * 1.7) + 0.1 * Math.sin(day * day * 0.013));
    if (flow !== null) lines.push(`${code},${isoOf(day)},${flow.toFixed(5)}`);
  }
  return lines;
}

/** Makes a region, takes the lines in as m³/s and waits until they are checked.
 *  @param registry  lines of code,name,river,area_km2 */
export async function regionWithFlows(name: string, lines: readonly string[], registry: readonly string[] = []) {
  const slug = await newRegion(name);
  const form = new FormData();
  form.set('choices', JSON.stringify({ all: { unit: 'm3/s' } }));
  if (registry.length > 0) {
    form.append('file', new Blob([`code,name,river,area_km2\n${registry.join('\n')}\n`]), 'stations.csv');
  }
  form.append('file', new Blob([`station,date,flow\n${lines.join('\n')}\n`]), 'flows.csv');
  const sent = await fetch(`${serverUrl}/api/regions/${slug}/imports`, { method: 'POST', body: form });
  expect(sent.status, await sent.clone().text()).toBe(202);
  const { id } = (await sent.json()) as { id: string };
  const over = async () => {
    const job = (await (await fetch(`${serverUrl}/api/jobs/${id}`)).json()) as { state: string; result: unknown };
    expect(job.state, JSON.stringify(job.result)).toBe('done');
  };
  await vi.waitFor(over, { timeout: 30_000, interval: 150 });
  return slug;
}
