/** Age of a heartbeat from which its job or import counts as dead, milliseconds. */
export const DEAD_AFTER_MS = 30_000;
