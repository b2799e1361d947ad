// Stamps say what a finished step was made from, so that a second run can see that nothing has changed.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import process from 'node:process';

/** SHA-256 over the names and contents of files and folders, whatever order the disk lists them in.
 *  @param root      names are taken relative to it
 *  @param entries   files or folders below root; those that do not exist are passed over
 *  @param leaveOut  tells whether a relative name with forward slashes is left out
 *  @returns         hexadecimal digest */
export function hashOf(root, entries, leaveOut = (/** @type {string} */ _name) => false) {
  const hash = createHash('sha256');
  for (const name of entries.flatMap((entry) => filesBelow(root, join(root, entry), leaveOut)).sort()) {
    const bytes = readFileSync(join(root, name));
    hash.update(`${name}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex');
}

function filesBelow(root, path, leaveOut) {
  if (!existsSync(path)) return [];
  const name = relative(root, path).split(sep).join('/');
  if (leaveOut(name)) return [];
  if (!statSync(path).isDirectory()) return [name];
  return readdirSync(path).flatMap((child) => filesBelow(root, join(path, child), leaveOut));
}

/** The stamp of a finished step, or null when there is none or it cannot be read. */
export function readStamp(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return null;
  }
}

/** Writes a stamp whole: a reader sees the old one or the new one, never half. */
export function writeStamp(file, stamp) {
  mkdirSync(dirname(file), { recursive: true });
  const half = `${file}.${process.pid}`;
  writeFileSync(half, `${JSON.stringify(stamp)}\n`);
  renameSync(half, file);
}
