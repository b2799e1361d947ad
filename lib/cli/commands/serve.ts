import { hostname, networkInterfaces } from 'node:os';
import { migrate } from '../../store/migrate.ts';
import { listRegions } from '../../store/regions.ts';
import { takeServerLock } from '../../store/server-lock.ts';
import { readArguments, wholeNumber } from '../arguments.ts';
import type { Host } from '../command.ts';
import { allowedHosts, isLoopback, LOOPBACK_HOSTS } from '../request-safety.ts';
import { listen, untilStopped } from '../server.ts';
import { UsageError } from '../usage-error.ts';

export const usage = `Usage: npx hungerstone serve [--port PORT] [--host HOST]

Runs the site on this machine until it is interrupted.

  --port PORT   default 3000; 0 takes any free one
  --host HOST   default 127.0.0.1. Any address that other machines can reach needs a secret in HUNGERSTONE_TOKEN:
                people open http://HOST:PORT/?token=SECRET once, programs send Authorization: Bearer SECRET.
  --demo        makes the invented demo region first, if there is no region
`;

/** The port comes first: a second start must hear that it is taken before it touches anything. */
export const withoutDatabase = true;

/** Takes the port first, so that a taken one is told at once; then builds what is not built, and says where the site is. */
export async function run(argv: string[], host: Host): Promise<number> {
  const { values } = readArguments(argv, {
    port: { type: 'string', default: process.env.PORT || '3000' },
    host: { type: 'string', default: '127.0.0.1' },
    demo: { type: 'boolean', default: false },
  });
  const port = wholeNumber('--port', values.port, 0, 65535);
  const address = values.host.replace(/^\[(.*)\]$/, '$1');
  const token = tokenFor(address);
  const site = await listen({
    port,
    host: address,
    dev: host.dev,
    policy: { hosts: allowedHosts(address, ownNames()), token },
  });
  let release = () => {};
  try {
    await migrate();
    release = takeServerLock();
    if (values.demo && (await listRegions()).length === 0) await host.seedDemo();
    if (!host.dev) await host.build();
    await site.open();
    process.stdout.write(`Hungerstone is at ${site.address}\n`);
    await untilStopped();
    return 0;
  } finally {
    await site.close();
    release();
  }
}

/** @throws UsageError when others could reach the server without a token */
function tokenFor(host: string): string | null {
  const token = process.env.HUNGERSTONE_TOKEN || null;
  if (isLoopback(host)) return token;
  if (token === null) {
    throw new UsageError(
      `--host ${host} lets other machines in: set HUNGERSTONE_TOKEN to a secret first, or leave --host at ${LOOPBACK_HOSTS[1]}.`,
    );
  }
  return token;
}

function ownNames(): string[] {
  const addresses = Object.values(networkInterfaces()).flatMap((list) => list?.map((entry) => entry.address) ?? []);
  return [hostname(), ...addresses];
}
