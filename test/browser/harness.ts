/** What every browser test stands on: one Chromium a file, pages that are watched for trouble, an accessibility check.
 *
 *  A test fails when its page logged an error, threw, broke the Content-Security-Policy, got a 5xx or a missing file, or
 *  asked any other host for anything. A test that provokes trouble says so first: `expectTrouble(page, /words/)`. */
import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect, inject } from 'vitest';
import { launchChromium } from './chromium.ts';

export interface PageOptions {
  width?: number;
  height?: number;
  colorScheme?: 'light' | 'dark';
}

/** Address of the server, without a slash at the end. */
export const serverUrl = inject('serverUrl');

let browser: Browser;
const watched = new Map<Page, string[]>();
const expected = new Map<Page, RegExp[]>();

beforeAll(async () => {
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
});

afterEach(async () => {
  const troubles = [...watched].flatMap(([page, lines]) =>
    lines.filter((line) => !expected.get(page)?.some((pattern) => pattern.test(line))),
  );
  const contexts = new Set([...watched.keys()].map((page) => page.context()));
  watched.clear();
  expected.clear();
  for (const context of contexts) await context.close();
  expect(troubles, 'trouble in the page').toEqual([]);
});

/** Opens a page of its own (own storage, own cookies); it is closed after the test.
 *  @param path  where to go first, below the server's address; without it nowhere */
export async function newPage(path?: string, options: PageOptions = {}): Promise<Page> {
  const { width = 1440, height = 900, colorScheme = 'light' } = options;
  const context = await browser.newContext({
    viewport: { width, height },
    colorScheme,
    baseURL: serverUrl,
    locale: 'en-GB',
    timezoneId: 'UTC',
  });
  const page = await context.newPage();
  const troubles: string[] = [];
  watched.set(page, troubles);
  await watch(page, troubles);
  if (path !== undefined) await page.goto(path, { waitUntil: 'load' });
  return page;
}

/** Lets trouble pass whose words match; each pattern for this page only. */
export function expectTrouble(page: Page, pattern: RegExp): void {
  expected.set(page, [...(expected.get(page) ?? []), pattern]);
}

/** What has gone wrong in a page so far. */
export const troubleOf = (page: Page): readonly string[] => watched.get(page) ?? [];

async function watch(page: Page, troubles: string[]): Promise<void> {
  page.on('console', (message) => {
    if (message.type() === 'error') troubles.push(`console: ${message.text()}`);
  });
  page.on('pageerror', (error) => troubles.push(`thrown: ${error.message}`));
  page.on('response', (response) => {
    const status = response.status();
    if (status >= 500) troubles.push(`answered ${status}: ${response.url()}`);
  });
  await page.exposeFunction('reportViolation', (text: string) => {
    troubles.push(`content policy: ${text}`);
  });
  await page.addInitScript(() => {
    document.addEventListener('securitypolicyviolation', (event) => {
      const report = (window as unknown as { reportViolation(text: string): void }).reportViolation;
      report(`${event.effectiveDirective} ${event.blockedURI} ${event.sourceFile}:${event.lineNumber}`);
    });
  });
  await page.route(
    (url) => /^(https?|wss?):$/.test(url.protocol) && url.origin !== new URL(serverUrl).origin,
    (route) => {
      troubles.push(`asked another host: ${route.request().url()}`);
      return route.abort();
    },
  );
}

const AXE = createRequire(import.meta.url).resolve('axe-core/axe.min.js');
const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

interface AxeResult {
  violations: { id: string; help: string; nodes: { target: string[]; failureSummary?: string }[] }[];
  passes: unknown[];
}

/** What breaks WCAG 2.2 AA on the page as it is now, one line a place.
 *  @param within  a selector, to look at one part only */
export async function accessibilityProblems(page: Page, within = 'html'): Promise<string[]> {
  // While a page is fetched anew its head is empty for a moment.
  await page.waitForFunction(() => document.title !== '');
  // By the debugger, not by a script element: the page's own content policy stays as it is.
  await page.evaluate(await readFile(AXE, 'utf8'));
  const result = await page.evaluate(
    ([selector, tags]) => {
      const axe = (window as unknown as { axe: { run(place: string, options: object): Promise<unknown> } }).axe;
      return axe.run(selector as string, { runOnly: { type: 'tag', values: tags } });
    },
    [within, WCAG] as const,
  );
  const { violations, passes } = result as AxeResult;
  expect(passes.length, 'accessibility rules that had something to look at').toBeGreaterThan(0);
  return violations.flatMap(({ id, help, nodes }) => nodes.map((node) => `${id}: ${help} (${node.target.join(' ')})`));
}

/** Waits until React has taken over every control of the page: it then does what it says. Parts that were streamed come
 *  alive one after another, so that some part being alive says nothing of the next. */
export async function hydrated(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const alive = (element: Element) => Object.keys(element).some((key) => key.startsWith('__reactProps'));
    const controls = [...document.querySelectorAll('button, input, select, textarea')];
    return controls.every(alive) && [...document.querySelectorAll('body *')].some(alive);
  });
}
