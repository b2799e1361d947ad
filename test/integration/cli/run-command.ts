import type { Host } from '../../../lib/cli/command.ts';
import { main } from '../../../lib/cli/main.ts';

const HOST: Host = { dev: false, build: async () => undefined, seedDemo: async () => undefined };

/** Runs a batch command in this process and catches what it writes. */
export async function runCommand(...argv: string[]): Promise<{ code: number; stdout: string; stderr: string }> {
  const written = { stdout: '', stderr: '' };
  const before = { stdout: process.stdout.write, stderr: process.stderr.write };
  const catchInto = (stream: 'stdout' | 'stderr') =>
    ((text: string, done?: () => void) => {
      written[stream] += text;
      done?.();
      return true;
    }) as typeof process.stdout.write;
  process.stdout.write = catchInto('stdout');
  process.stderr.write = catchInto('stderr');
  try {
    return { code: await main(argv, HOST), ...written };
  } finally {
    process.stdout.write = before.stdout;
    process.stderr.write = before.stderr;
  }
}
