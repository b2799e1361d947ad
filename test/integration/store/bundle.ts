import { join } from 'node:path';
import { build } from 'esbuild';

const root = process.cwd();

/** Bundles a few lines that import from the project (`@/lib/…`) to a file that another Node process can run. */
export async function bundleScript(lines: string, outfile: string): Promise<string> {
  await build({
    stdin: { contents: lines, resolveDir: root, loader: 'ts' },
    alias: { '@': root },
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    // Beside the database there is no node_modules: name the packages by their place.
    plugins: [
      {
        name: 'packages',
        setup: ({ onResolve }) =>
          onResolve({ filter: /^(libsql|@prisma\/|@libsql\/)/ }, async ({ path }) => ({
            path: import.meta.resolve(path, `file://${join(root, 'package.json')}`),
            external: true,
          })),
      },
    ],
    logLevel: 'silent',
  });
  return outfile;
}
