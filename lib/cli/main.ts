/** The batch commands' entry: bundled to .build/cli.mjs and called by hungerstone.js once all is set up. */
import { migrate } from '../store/migrate.ts';
import type { Command, Host } from './command.ts';
import * as backup from './commands/backup.ts';
import * as breaks from './commands/breaks.ts';
import * as curves from './commands/curves.ts';
import * as exportCommand from './commands/export.ts';
import * as importCommand from './commands/import.ts';
import * as minima from './commands/minima.ts';
import * as pair from './commands/pair.ts';
import * as rank from './commands/rank.ts';
import * as regional from './commands/regional.ts';
import * as restore from './commands/restore.ts';
import * as serve from './commands/serve.ts';
import * as windows from './commands/windows.ts';
import { isUsageError } from './usage-error.ts';

const COMMANDS: Record<string, Command> = {
  import: importCommand,
  rank,
  minima,
  curves,
  windows,
  breaks,
  pair,
  regional,
  export: exportCommand,
  backup,
  restore,
  serve,
};

/** Runs one batch command.
 *  @param argv  the command's name and its options
 *  @param host  what only the set-up can do for a command
 *  @returns     exit code: 0 done, 1 failed, 2 wrong usage, 3 taken in with rejected rows */
export async function main(argv: string[], host: Host): Promise<number> {
  const [name, ...rest] = argv;
  const command = COMMANDS[name];
  if (!command) {
    process.stderr.write(`Unknown command "${name}". The commands are ${Object.keys(COMMANDS).join(', ')}.\n`);
    return 2;
  }
  if (rest.includes('--help') || rest.includes('-h')) {
    process.stdout.write(`${command.usage.trimEnd()}\n`);
    return 0;
  }
  try {
    if (!command.withoutDatabase) await migrate();
    return await command.run(rest, host);
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    if (!isUsageError(error)) return 1;
    process.stderr.write(`npx hungerstone ${name} --help tells the options.\n`);
    return 2;
  }
}
