import { batch } from '../batch.js';

/** `npm run dev`: the same server, with code reloaded as it changes. */
export const task = (argv) => batch(['serve', '--demo', ...argv], { dev: true });
