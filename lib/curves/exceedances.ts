/** Exceedances at which curves are kept, compared and drawn: every percent, and closer at both ends, where the flows
 *  that matter in floods and droughts stand. Rising, 0 to 1. */
export const STANDARD_EXCEEDANCES: readonly number[] = Object.freeze([
  0.001,
  0.002,
  0.005,
  ...Array.from({ length: 99 }, (_, i) => (i + 1) / 100),
  0.995,
  0.998,
  0.999,
]);
