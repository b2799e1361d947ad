import type * as worker from './worker.ts';

/** The tasks by name, as types only: nothing of them is loaded into the server. */
export type Tasks = typeof worker;
export type TaskName = keyof Tasks;
