import { readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { BATCH_COMMANDS, HELP } from '../../../lib/cli/setup/commands.js';

const MODULES = readdirSync(new URL('../../../lib/cli/commands', import.meta.url))
  .filter((name) => name.endsWith('.ts'))
  .map((name) => name.slice(0, -'.ts'.length));

test('every command that has a module can be called, and is named in the help', () => {
  expect([...BATCH_COMMANDS].sort()).toEqual(MODULES.sort());
  for (const name of BATCH_COMMANDS) expect(HELP).toMatch(new RegExp(`^  ${name} +\\S`, 'm'));
});
