import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { inProject, ROOT } from '../paths.js';

/** What may lie in the project's root, beside dot-files. */
const TOP_LEVEL = new Set([
  ...['app', 'lib', 'prisma', 'public', 'seed', 'test'],
  ...['package.json', 'package-lock.json', 'tsconfig.json', 'next.config.js', 'prisma.config.ts', 'vitest.config.ts'],
  ...['biome.json', 'instrumentation.ts', 'README.md', 'DEVELOPERS.md', 'CHANGELOG.md', 'LICENSE'],
]);

const BIN = 'lib/cli/hungerstone.js';

/** The committed files as `git ls-files -s` tells them; null where the project is no git checkout.
 *  @returns [{mode, path}] */
export function committedFiles() {
  try {
    const text = execFileSync('git', ['ls-files', '-s', '-z'], { cwd: ROOT, encoding: 'utf8', maxBuffer: 2 ** 26 });
    return text
      .split('\0')
      .filter(Boolean)
      .map((line) => ({ mode: line.slice(0, 6), path: line.slice(line.indexOf('\t') + 1) }));
  } catch {
    return null;
  }
}

/** @returns what is wrong with the committed tree, a line each */
export function treeProblems(files) {
  const problems = [];
  const top = new Set(files.map((file) => file.path.split('/')[0]));
  const extra = [...top].filter((name) => !TOP_LEVEL.has(name) && !name.startsWith('.'));
  if (extra.length) problems.push(`the project's root has no place for ${extra.join(', ')}`);
  const bin = files.find((file) => file.path === BIN);
  if (bin?.mode !== '100755')
    problems.push(`${BIN} must be committed with mode 100755: git update-index --chmod=+x ${BIN}`);
  return problems;
}

/** A lock that names a registry would send everyone's installs there. */
export function lockProblem(text) {
  const host = /"resolved":\s*"(https?:\/\/[^/"]+)/.exec(text)?.[1];
  return host ? `package-lock.json names a registry (${host}): npm install --omit-lockfile-registry-resolved` : null;
}

/** @returns null, or what is wrong */
export function checkTree() {
  const files = committedFiles();
  const problems = files ? treeProblems(files) : [];
  const lock = lockProblem(readFileSync(inProject('package-lock.json'), 'utf8'));
  if (lock) problems.push(lock);
  return problems.length ? problems.join('\n') : null;
}
