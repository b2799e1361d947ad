import { readFileSync, realpathSync } from 'node:fs';
import process from 'node:process';
import { BATCH_COMMANDS, HELP } from './commands.js';
import { inProject, ROOT } from './paths.js';
import { SetupError, say } from './say.js';

/** What developers and `npm` call; each module exports `task(argv): Promise<exit code>`. */
const TASKS = {
  start: () => import('./tasks/start.js'),
  dev: () => import('./tasks/dev.js'),
  test: () => import('./tasks/test.js'),
  check: () => import('./tasks/check.js'),
  bench: () => import('./tasks/bench.js'),
  validate: () => import('./tasks/validate.js'),
};

/** Runs one command line.
 *  @param argv  the words after `hungerstone`
 *  @returns     the exit code */
export async function launch(argv) {
  const [command, ...rest] = argv;
  if (command === undefined) {
    process.stderr.write(HELP);
    return 2;
  }
  if (command === '--help' || command === '-h' || command === 'help') {
    process.stdout.write(HELP);
    return 0;
  }
  if (command === '--version') {
    process.stdout.write(`${JSON.parse(readFileSync(inProject('package.json'), 'utf8')).version}\n`);
    return 0;
  }
  if (!(command in TASKS) && !BATCH_COMMANDS.includes(command)) {
    say(`Unknown command "${command}". The commands are ${[...BATCH_COMMANDS, ...Object.keys(TASKS)].join(', ')}.`);
    return 2;
  }
  process.env.NEXT_TELEMETRY_DISABLED = '1';
  // A reader that has seen enough (`… | head`) closes the pipe: no failure.
  process.stdout.on('error', (error) => process.exit(error.code === 'EPIPE' ? 0 : 1));
  try {
    if (command in TASKS) {
      process.chdir(ROOT);
      return await (await TASKS[command]()).task(rest);
    }
    if (realpathSync(process.cwd()) !== realpathSync(ROOT)) {
      say(`Run this from the project's root: cd ${ROOT}`);
      return 2;
    }
    return await (await import('./batch.js')).batch([command, ...rest]);
  } catch (error) {
    say(error instanceof SetupError ? error.message : String(error?.stack ?? error));
    return 1;
  }
}
