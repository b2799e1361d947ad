import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import { inProject, ROOT } from './paths.js';
import { SetupError } from './say.js';

/** The build that tests and checks look at, apart from the one that a running server uses. */
const DIST = '.next-test';

/** Builds the site if it has changed, and serves it on a free port with a database of its own that holds the demo region.
 *  With `HUNGERSTONE_AS_BUILT: '1'` in `env` the build is taken as it is: for a second server beside a running one.
 *  @param args  further words for `serve`
 *  @param env   further environment of the server
 *  @returns     its address, its database, and `stop`, which also removes the database */
export async function startTrial(args = [], env = {}) {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-trial-'));
  const database = `file:${join(folder, 'trial.db')}`;
  const server = spawn(process.execPath, [inProject('lib/cli/hungerstone.js'), 'start', '--port', '0', ...args], {
    cwd: ROOT,
    env: {
      ...process.env,
      NODE_ENV: 'production',
      NEXT_DIST: DIST,
      DATABASE_URL: database,
      HUNGERSTONE_TOKEN: '',
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const remove = () => rmSync(folder, { recursive: true, force: true, maxRetries: 3 });
  const log = [];
  server.stderr.on('data', (bytes) => log.push(bytes));
  const ended = new Promise((resolve) => server.once('close', resolve));
  try {
    const url = await addressOf(server, ended, log);
    const stop = async () => {
      server.kill('SIGTERM');
      const code = await ended;
      remove();
      return code;
    };
    return { url, database, stop, log: () => Buffer.concat(log).toString() };
  } catch (error) {
    server.kill('SIGKILL');
    remove();
    throw error;
  }
}

function addressOf(server, ended, log) {
  return new Promise((resolve, reject) => {
    let said = '';
    server.stdout.on('data', (bytes) => {
      said += bytes;
      const match = /Hungerstone is at (http:\/\/\S+)/.exec(said);
      if (match) resolve(match[1]);
    });
    void ended.then((code) =>
      reject(new SetupError(`The site ended with ${code} before it was ready:\n${Buffer.concat(log)}`)),
    );
  });
}
