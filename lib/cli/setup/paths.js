import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's root: three folders above this file. */
export const ROOT = resolve(dirname(fileURLToPath(import.meta.url)), '../../..');

/** An absolute path inside the project. */
export const inProject = (...parts) => join(ROOT, ...parts);
