import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import process from 'node:process';
import { inProject, ROOT } from './paths.js';
import { run, runNode } from './run.js';
import { SetupError, say } from './say.js';
import { hashOf, readStamp, writeStamp } from './stamp.js';

const STAMP = inProject('node_modules', '.hungerstone.json');
const lockHash = () => hashOf(ROOT, ['package-lock.json']);

/** True when node_modules was made from the present package-lock.json. */
export function isInstalled() {
  const stamp = readStamp(STAMP);
  return stamp !== null && stamp.lock === lockHash() && stamp.platform === `${process.platform}-${process.arch}`;
}

/** Installs every package of the lock, unless npm's own list says that they are all there already. */
export async function install() {
  if (!agreesWithLock(readJson('package-lock.json'), readJson('node_modules/.package-lock.json'))) {
    say('Installing packages …');
    const code = await npm(['ci', '--include=dev', '--no-fund', '--no-audit', '--loglevel=error']);
    if (code !== 0) throw new SetupError(`npm ci ended with ${code}: the packages could not be installed.`);
  }
  writeStamp(STAMP, { lock: lockHash(), platform: `${process.platform}-${process.arch}` });
}

/** Whether the packages that npm says it installed are those of the lock.
 *  @param wanted   package-lock.json, parsed
 *  @param present  node_modules/.package-lock.json, parsed, or null
 *  @returns        false as soon as one differs; optional packages may be absent, for another system's are */
export function agreesWithLock(wanted, present) {
  if (!wanted || !present) return false;
  const installed = present.packages ?? {};
  const places = Object.keys(wanted.packages ?? {}).filter((place) => place !== '');
  if (Object.keys(installed).some((place) => !(place in wanted.packages))) return false;
  return places.every((place) => {
    const entry = wanted.packages[place];
    const found = installed[place];
    return found ? found.version === entry.version && found.integrity === entry.integrity : Boolean(entry.optional);
  });
}

function readJson(name) {
  return existsSync(inProject(name)) ? JSON.parse(readFileSync(inProject(name), 'utf8')) : null;
}

/** npm as this Node has it: the one that started us, else the one installed beside Node, else the one on the path. */
function npm(args) {
  const beside = join(dirname(process.execPath), '../lib/node_modules/npm/bin/npm-cli.js');
  const script = [process.env.npm_execpath, beside].find((path) => path?.endsWith('npm-cli.js') && existsSync(path));
  return script ? runNode([script, ...args]) : run('npm', args);
}
