import { THREADS } from './pool.ts';

/** Where long work stands; what the event stream of its job carries. */
export interface LaneProgress {
  /** what is being done, one word. Example: "certainty" */
  stage: string;
  /** pieces done, of how many */
  done: number;
  of: number;
  /** 0 to 1 */
  share: number;
}

/** What long work is given: both may be left out. */
export interface WorkContext {
  /** aborted when nobody wants the answer any more */
  signal?: AbortSignal;
  onProgress?: (progress: LaneProgress) => void;
}

/** Runs `work` on every piece, one piece a worker at a time, so that whatever others ask of the workers waits for one piece
 *  and not for all of them.
 *  @param stage  see LaneProgress
 *  @returns      the answers in the order of the pieces
 *  @throws what `work` throws; an AbortError when cancelled */
export async function inLanes<Piece, Answer>(
  stage: string,
  pieces: readonly Piece[],
  work: (piece: Piece, index: number) => Promise<Answer>,
  { signal, onProgress }: WorkContext = {},
): Promise<Answer[]> {
  const answers = new Array<Answer>(pieces.length);
  const next = pieces.entries();
  let done = 0;
  const lane = async () => {
    for (const [index, piece] of next) {
      signal?.throwIfAborted();
      answers[index] = await work(piece, index);
      done += 1;
      onProgress?.({ stage, done, of: pieces.length, share: done / pieces.length });
    }
  };
  await Promise.all(Array.from({ length: THREADS }, lane));
  return answers;
}
