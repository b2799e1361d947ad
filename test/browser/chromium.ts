import { existsSync } from 'node:fs';
import sparticuz from '@sparticuz/chromium';
import { type Browser, chromium } from 'playwright-core';

/** Arguments that would make the browser unlike a person's: with one process, closing a page ends it; without web
 *  security, other sites may read ours. */
const UNWANTED = new Set(['--single-process', '--disable-web-security', '--allow-running-insecure-content']);

const SYSTEM = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

/** Starts Chromium: the one in CHROMIUM_PATH, the packaged one, else the system's.
 *  @throws Error that tells what each of them said */
export async function launchChromium(): Promise<Browser> {
  const said: string[] = [];
  for (const { path, args } of await candidates()) {
    try {
      return await chromium.launch({ executablePath: path, args: [...args, '--no-sandbox'] });
    } catch (error) {
      said.push(`${path}: ${String(error).split('\n').slice(0, 3).join(' ')}`);
    }
  }
  throw new Error(`No Chromium could be started; name one in CHROMIUM_PATH.\n${said.join('\n')}`);
}

async function candidates(): Promise<{ path: string; args: string[] }[]> {
  const list: { path: string; args: string[] }[] = [];
  if (process.env.CHROMIUM_PATH) list.push({ path: process.env.CHROMIUM_PATH, args: [] });
  if (process.platform === 'linux' && process.arch === 'x64') {
    const args = sparticuz.args.filter((argument) => !UNWANTED.has(argument));
    list.push({ path: await sparticuz.executablePath(), args });
  }
  return [...list, ...SYSTEM.filter((path) => existsSync(path)).map((path) => ({ path, args: [] }))];
}
