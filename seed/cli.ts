/** Makes an invented region: as files, or in the database.
 *
 *    node .build/seed.mjs --demo                        the demo region (seed 1921), if the database has no region
 *    node .build/seed.mjs --stations 2000 --years 60 --csv flows.csv --registry stations.csv
 *    node .build/seed.mjs --stations 2000 --years 60 --seed 7 --region "Large"
 *
 *  --stations N     how many stations (36)
 *  --years Y        length of every record; without it 25 to 90 years, one short one, and the other traits of the demo
 *  --seed S         seed number (1921); the same number makes the same region
 *  --csv FILE       daily flows as one long table: station,date,flow,flag
 *  --registry FILE  the stations
 *  --layers FOLDER  basin, catchments and rivers as GeoJSON
 *  --region NAME    writes it to the database (DATABASE_URL, or data/hungerstone.db) as a region of that name
 *
 *  Bundled by `npm start` and every batch command. Progress goes to stderr; exit 1 failed, 2 wrong usage. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { parseArgs } from 'node:util';
import { migrate } from '../lib/store/migrate.ts';
import { closeStore } from '../lib/store/open.ts';
import { registryCsv, writeFlowsCsv } from './csv.ts';
import { seedDemo } from './demo.ts';
import { DEMO_SEED, DEMO_STATIONS, generateRegion, type SeedRegion } from './generate.ts';
import { storeRegion } from './store-region.ts';

const USAGE =
  'usage: seed (--demo | [--stations N] [--years Y] [--seed S] ' +
  '[--csv FILE] [--registry FILE] [--layers FOLDER] [--region NAME])';

class UsageError extends Error {}

const say = (text: string) => process.stderr.write(`${text}\n`);

function readArguments() {
  const text = { type: 'string' } as const;
  try {
    const { values } = parseArgs({
      options: {
        demo: { type: 'boolean' },
        ...{ stations: text, years: text, seed: text, csv: text, registry: text, layers: text, region: text },
      },
    });
    return values;
  } catch (error) {
    throw new UsageError(error instanceof Error ? error.message : String(error));
  }
}

function whole(name: string, text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  if (!/^-?\d+$/.test(text)) throw new UsageError(`--${name} must be a whole number, got "${text}"`);
  return Number(text);
}

async function main(): Promise<void> {
  const { demo, csv, registry, layers, region: name, ...numbers } = readArguments();
  if (demo) {
    await migrate();
    const slug = await seedDemo();
    say(slug === null ? 'There is a region already; no demo was made.' : `Made the demo region, ${slug}.`);
    return;
  }
  if (!csv && !registry && !layers && !name) throw new UsageError('nothing to do');
  const region = generateRegion({
    seed: whole('seed', numbers.seed) ?? DEMO_SEED,
    stations: whole('stations', numbers.stations) ?? DEMO_STATIONS,
    years: whole('years', numbers.years),
  });
  if (registry) writeFileSync(registry, registryCsv(region.stations));
  if (layers) writeLayers(layers, region);
  if (csv) say(`Wrote ${await writeFlowsCsv(csv, region.records())} rows to ${csv}.`);
  if (!name) return;
  await migrate();
  const slug = await storeRegion(region, { name, onProgress: progressOf(region) });
  say(`Stored ${region.stations.length} stations as ${slug}.`);
}

function writeLayers(folder: string, region: SeedRegion): void {
  mkdirSync(folder, { recursive: true });
  for (const layer of region.layers()) {
    writeFileSync(join(folder, `${layer.name.toLowerCase()}.geojson`), JSON.stringify(layer.geojson));
  }
}

/** Tells every tenth of the way. */
function progressOf({ stations }: SeedRegion): (share: number) => void {
  let told = 0;
  return (share) => {
    if (stations.length < 200 || share < told + 0.1) return;
    told = Math.floor(share * 10) / 10;
    say(`${Math.round(told * 100)} % of the stations made`);
  };
}

try {
  await main();
} catch (error) {
  const wrongUsage = error instanceof UsageError || error instanceof RangeError;
  say(error instanceof Error ? error.message : String(error));
  if (wrongUsage) say(USAGE);
  process.exitCode = wrongUsage ? 2 : 1;
} finally {
  await closeStore();
}
