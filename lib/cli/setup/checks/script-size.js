import { gzipSync } from 'node:zlib';
import { startTrial } from '../trial.js';

/** Bytes of compressed script that the map page may ask for before it can be used. */
export const SCRIPT_LIMIT = 300_000;

/** Builds the site, serves it with the demo region and weighs the scripts that the map page's HTML names.
 *  @returns null, or what is wrong; prints the weight */
export async function checkScriptSize(print) {
  const trial = await startTrial();
  try {
    const regions = await (await fetch(`${trial.url}/api/regions`)).json();
    const slug = regionSlug(regions);
    const page = await fetch(`${trial.url}/regions/${slug}`);
    if (!page.ok) return `the map page answers ${page.status}`;
    const names = scriptsOf(await page.text());
    if (names.length === 0) return 'the map page names no script: the measure would say nothing';
    let total = 0;
    for (const name of names) {
      const answer = await fetch(new URL(name, trial.url));
      if (!answer.ok) return `${name} answers ${answer.status}`;
      total += gzipSync(Buffer.from(await answer.arrayBuffer()), { level: 6 }).length;
    }
    print(
      `map page: ${names.length} scripts, ${(total / 1000).toFixed(1)} kB compressed (at most ${SCRIPT_LIMIT / 1000})`,
    );
    return total <= SCRIPT_LIMIT ? null : `the map page loads ${(total / 1000).toFixed(1)} kB of script`;
  } finally {
    await trial.stop();
  }
}

function regionSlug(answer) {
  const list = Array.isArray(answer) ? answer : answer.regions;
  return list[0].slug;
}

/** Addresses of the scripts that a page loads or preloads; those for browsers without modules are not loaded. */
export function scriptsOf(html) {
  const tags = html.match(/<(?:script|link)\b[^>]*>/g) ?? [];
  const names = tags
    .filter((tag) => !/\bnomodule\b/i.test(tag))
    .filter((tag) => tag.startsWith('<script') || /\brel="modulepreload"|\bas="script"/.test(tag))
    .map((tag) => /\b(?:src|href)="([^"]+)"/.exec(tag)?.[1])
    .filter((name) => name !== undefined);
  return [...new Set(names)];
}
