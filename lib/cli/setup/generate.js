import { existsSync } from 'node:fs';
import process from 'node:process';
import { inProject, ROOT } from './paths.js';
import { runNode } from './run.js';
import { SetupError, say } from './say.js';
import { hashOf, readStamp, writeStamp } from './stamp.js';

const STAMP = inProject('.build', 'generated.json');
const schemaHash = () => hashOf(ROOT, ['prisma/schema.prisma', 'node_modules/prisma/package.json']);

/** True when the database client was generated from the present schema by the present Prisma. */
export function isGenerated() {
  return existsSync(inProject('lib/store/generated/client.ts')) && readStamp(STAMP)?.schema === schemaHash();
}

/** Generates the database client. Prisma would fetch a schema engine first; naming any program as that engine keeps it
 *  from the network, and `generate` never starts it. */
export async function generate() {
  say('Generating the database client …');
  const code = await runNode([inProject('node_modules/prisma/build/index.js'), 'generate'], {
    quiet: true,
    env: {
      PRISMA_SCHEMA_ENGINE_BINARY: process.execPath,
      PRISMA_HIDE_UPDATE_MESSAGE: '1',
      CHECKPOINT_DISABLE: '1',
    },
  });
  if (code !== 0) throw new SetupError(`prisma generate ended with ${code}.`);
  writeStamp(STAMP, { schema: schemaHash() });
}
