import { mkdirSync } from 'node:fs';
import { inProject, ROOT } from '../paths.js';
import { prepare } from '../prepare.js';
import { runNode } from '../run.js';

/** `npm run validate`: simulates what the methods promise. With --write the figures are kept. */
export async function task(argv) {
  await prepare();
  const { build } = await import('esbuild');
  mkdirSync(inProject('.build'), { recursive: true });
  const outfile = inProject('.build', 'validate.mjs');
  await build({
    absWorkingDir: ROOT,
    entryPoints: ['test/validate/main.ts'],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    logLevel: 'warning',
  });
  return runNode([outfile, ...argv], { stdout: 'inherit' });
}
