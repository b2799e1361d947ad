import process from 'node:process';
import { checkLicences, writeLicences } from '../checks/licences.js';
import { checkScriptSize } from '../checks/script-size.js';
import { checkTree } from '../checks/tree.js';
import { inProject } from '../paths.js';
import { prepare } from '../prepare.js';
import { runNode } from '../run.js';

const print = (line) => process.stdout.write(`${line}\n`);

const program = async (script, args, options) => {
  const code = await runNode([inProject('node_modules', script), ...args], { stdout: 'inherit', ...options });
  return code === 0 ? null : `ended with ${code}`;
};

/** Name and work of every check, quick ones first; each answers null, or what is wrong. */
const CHECKS = [
  ['files of the project', async () => checkTree()],
  ['third-party licences', async () => checkLicences()],
  ['format and lint', () => program('@biomejs/biome/bin/biome', ['check', '--error-on-warnings', '.'])],
  ['import floors', () => program('vitest/vitest.mjs', ['run', '--project', 'unit', 'test/unit/floors.test.ts'])],
  ['route types', () => program('next/dist/bin/next', ['typegen'], { quiet: true })],
  ['types', () => program('typescript/bin/tsc', ['--noEmit', '-p', inProject('tsconfig.json')])],
  ['script size', () => checkScriptSize(print)],
];

/** `npm run check`: every check runs, also after one has failed. */
export async function task(argv) {
  if (argv.includes('--write-licences')) writeLicences();
  await prepare();
  const failed = [];
  for (const [name, work] of CHECKS) {
    print(`── ${name}`);
    const problem = await work().catch((error) => error.message);
    if (problem === null) continue;
    print(problem);
    failed.push(name);
  }
  print(failed.length ? `Not well: ${failed.join(', ')}.` : 'All checks passed.');
  return failed.length ? 1 : 0;
}
