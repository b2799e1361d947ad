import { batch } from '../batch.js';

/** `npm start`: the site, with the demo region when the database has no region. */
export const task = (argv) => batch(['serve', '--demo', ...argv]);
