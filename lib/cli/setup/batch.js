import process from 'node:process';
import { pathToFileURL } from 'node:url';
import { ensureBuilt } from './build.js';
import { inProject } from './paths.js';
import { prepare } from './prepare.js';
import { runNode } from './run.js';
import { SetupError, say } from './say.js';

/** Runs a batch command of the bundle, after whatever set-up it needs.
 *  @param argv  command and its options
 *  @param dev   for `serve`: reload code as it changes, without a build
 *  @returns     the exit code */
export async function batch(argv, { dev = false } = {}) {
  process.env.NODE_ENV ??= dev ? 'development' : 'production';
  await prepare();
  const { main } = await import(pathToFileURL(inProject('.build', 'cli.mjs')).href);
  return main(argv, { dev, build: () => ensureBuilt(process.env.NEXT_DIST || '.next'), seedDemo });
}

async function seedDemo() {
  say('Making the demo region …');
  const code = await runNode([inProject('.build', 'seed.mjs'), '--demo'], { quiet: true });
  if (code !== 0) throw new SetupError(`The demo region could not be made (exit ${code}).`);
}
