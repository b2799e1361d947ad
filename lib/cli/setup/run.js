import { spawn } from 'node:child_process';
import process from 'node:process';
import { ROOT } from './paths.js';

/** Runs a program to its end, in the project's root.
 *  @param options.quiet  hold the output back and show it only when the program fails
 *  @param options.stdout 'inherit' for a program whose output is the product; else it goes to stderr
 *  @returns              its exit code (1 when a signal ended it) */
export function run(program, args, { env = {}, quiet = false, stdout = 'stderr' } = {}) {
  return new Promise((resolve, reject) => {
    const out = quiet ? 'pipe' : stdout === 'inherit' ? 'inherit' : process.stderr;
    const child = spawn(program, args, {
      cwd: ROOT,
      env: { ...process.env, ...env },
      stdio: ['ignore', out, quiet ? 'pipe' : 'inherit'],
      shell: process.platform === 'win32' && !program.endsWith('.exe'),
    });
    const held = [];
    if (quiet) for (const stream of [child.stdout, child.stderr]) stream.on('data', (bytes) => held.push(bytes));
    child.on('error', reject);
    child.on('close', (code) => {
      if (quiet && code !== 0) process.stderr.write(Buffer.concat(held));
      resolve(code ?? 1);
    });
  });
}

/** Runs a script by this very Node. */
export const runNode = (args, options) => run(process.execPath, args, options);
