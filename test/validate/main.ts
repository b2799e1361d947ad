/** `npm run validate`: simulates, prints each figure beside what it is meant to be, and with --write keeps the figures
 *  where the program, its methods page and the README take them from. Words given to it choose claims; --cases=40 tries
 *  fewer cases. */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { isMainThread, parentPort, Worker, workerData } from 'node:worker_threads';
import { METHODS_VERSION } from '../../lib/region/methods-version.ts';
import type { SimulatedFigure } from '../../lib/region/simulated-figures.ts';
import { figureOf, isAsMeant } from './figure.ts';
import { figuresTable, withTable } from './print.ts';
import { SCENARIOS } from './scenarios.ts';

const THREADS = 2;
const FIGURES_FILE = 'lib/region/simulated-figures.json';
const README = 'README.md';

/** Runs one scenario in a thread of its own. */
const inThread = (place: number, cases: number | undefined): Promise<SimulatedFigure> =>
  new Promise((resolve, reject) => {
    const worker = new Worker(fileURLToPath(import.meta.url), { workerData: { place, cases } });
    worker.once('message', resolve);
    worker.once('error', reject);
  });

async function main(argv: string[]): Promise<number> {
  const write = argv.includes('--write');
  const cases = casesIn(argv);
  if (write && cases !== undefined) {
    process.stderr.write('Figures that are kept are those of all cases: --write and --cases do not go together.\n');
    return 2;
  }
  const chosen = argv.filter((word) => !word.startsWith('--'));
  const places = SCENARIOS.map((_, place) => place).filter(
    (place) => chosen.length === 0 || chosen.includes(SCENARIOS[place].claim),
  );
  if (places.length === 0) {
    const claims = [...new Set(SCENARIOS.map(({ claim }) => claim))];
    process.stderr.write(`No such claim. The claims are ${claims.join(', ')}.\n`);
    return 2;
  }
  const figures = new Map<number, SimulatedFigure>();
  const queue = places.values();
  const lane = async () => {
    for (const place of queue) {
      figures.set(place, await inThread(place, cases));
      // what has been simulated stays when the rest is broken off
      if (write) keep([figures.get(place)!]);
      process.stderr.write(`${figures.size} of ${places.length} simulated\n`);
    }
  };
  await Promise.all(Array.from({ length: THREADS }, lane));
  const got = places.map((place) => figures.get(place)!);
  process.stdout.write(`${figuresTable(got)}\n`);
  const off = got.filter((figure) => !isAsMeant(figure));
  for (const { claim, of, setting, value } of off)
    process.stdout.write(`NOT AS MEANT: ${claim}, ${of}, ${setting}: ${value}\n`);
  return off.length === 0 ? 0 : 1;
}

/** Lays figures over those that are kept; the order is that of the scenarios. */
function keep(got: readonly SimulatedFigure[]): void {
  const nameOf = ({ claim, of, setting }: Pick<SimulatedFigure, 'claim' | 'of' | 'setting'>) =>
    JSON.stringify([claim, of, setting]);
  const before = JSON.parse(readFileSync(FIGURES_FILE, 'utf8')) as { figures: SimulatedFigure[] };
  const all = new Map([...before.figures, ...got].map((figure) => [nameOf(figure), figure]));
  const figures = SCENARIOS.flatMap((scenario) => all.get(nameOf(scenario)) ?? []);
  const text = JSON.stringify({ methodsVersion: METHODS_VERSION, figures }, null, 2);
  // as the formatter has it: pairs on one line
  writeFileSync(FIGURES_FILE, `${text.replace(/\[\s+([^\s,[\]]+),\s+([^\s,[\]]+)\s+\]/g, '[$1, $2]')}\n`);
  writeFileSync(README, withTable(readFileSync(README, 'utf8'), figuresTable(figures)));
}

/** Example: ["--cases=40"] → 40 */
function casesIn(argv: readonly string[]): number | undefined {
  const word = argv.find((each) => each.startsWith('--cases='));
  return word === undefined ? undefined : Number(word.slice('--cases='.length));
}

if (isMainThread) process.exitCode = await main(process.argv.slice(2));
else {
  const { place, cases } = workerData as { place: number; cases?: number };
  parentPort?.postMessage(figureOf(SCENARIOS[place], cases));
}
