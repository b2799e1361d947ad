/** Time a slice may take, milliseconds: well under a frame, so that dragging stays smooth. */
const SLICE = 5;

/** Runs steps a slice a frame until they are done.
 *  @param onDone  called after the last step
 *  @param onSlice called after every slice
 *  @returns how to give it up */
export function inSlices(steps: Iterator<unknown>, onDone: () => void, onSlice?: () => void): () => void {
  let frame = 0;
  const run = () => {
    const until = performance.now() + SLICE;
    do {
      if (steps.next().done) {
        onDone();
        return;
      }
    } while (performance.now() < until);
    onSlice?.();
    frame = requestAnimationFrame(run);
  };
  frame = requestAnimationFrame(run);
  return () => cancelAnimationFrame(frame);
}
