import type { Basis, BasisKey } from '../basis.ts';
import type { SharedWater } from '../region/regional-answers.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { checkAsRead } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';
import type { WeeklyFlows } from './tasks/weekly-flows.ts';

const KEYS: readonly BasisKey[] = ['exclude'];

/** Stations of which one task takes the correlations with all that come after them. */
const ROWS_PER_TASK = 25;

/** Which stations of a region have flows that go together, and how long each record is; whatever the other terms of the
 *  basis are, so that it is worked out once.
 *  @throws an AbortError when cancelled */
export function sharedWaterOf(
  stations: readonly StationInput[],
  { exclude }: Basis,
  context: WorkContext = {},
): Promise<SharedWater> {
  const values = { exclude } as Basis;
  const key = resultKey('shared-water', { values, keys: KEYS }, stations, 'none');
  return cached('shared-water', key, async () => {
    const flows = await readWeekly(stations, exclude, half(context, 0));
    const { matrix, weeks } = alongWeeks(flows);
    const rows = chunksOf(
      stations.map((_, i) => i),
      ROWS_PER_TASK,
    );
    const pairs = await inLanes(
      'flows',
      rows,
      (chunk) =>
        runTask('correlatedFlows', { values: matrix, weeks, from: chunk[0], to: chunk[chunk.length - 1] + 1 }, context),
      half(context, 0.5),
    );
    const codeAt = (place: number) => stations[place].facts.code;
    return {
      valuedDays: new Map(flows.map(({ valuedDays }, i) => [codeAt(i), valuedDays])),
      correlated: pairs.flat().map(({ a, b, correlation }) => ({ a: codeAt(a), b: codeAt(b), correlation })),
    };
  });
}

async function readWeekly(
  stations: readonly StationInput[],
  exclude: Basis['exclude'],
  context: WorkContext,
): Promise<WeeklyFlows[]> {
  const parts = await inLanes(
    'flows',
    chunksOf(stations),
    async (chunk) => {
      const read = await runTask('weeklyFlows', { stationIds: chunk.map(({ facts }) => facts.id), exclude });
      checkAsRead(chunk, read.hashes);
      return read.flows;
    },
    context,
  );
  return parts.flat();
}

/** Every station's weeks over the weeks of all, in memory that the workers share: it is not copied to each of them. */
function alongWeeks(flows: readonly WeeklyFlows[]): { matrix: Float32Array; weeks: number } {
  const held = flows.filter(({ values }) => values.length > 0);
  const first = held.reduce((least, { firstWeek }) => Math.min(least, firstWeek), Number.POSITIVE_INFINITY);
  const end = held.reduce((most, { firstWeek, values }) => Math.max(most, firstWeek + values.length), first);
  const weeks = held.length === 0 ? 0 : end - first;
  const bytes = flows.length * weeks * Float32Array.BYTES_PER_ELEMENT;
  const matrix = new Float32Array(new SharedArrayBuffer(bytes)).fill(Number.NaN);
  flows.forEach(({ firstWeek, values }, i) => {
    if (values.length > 0) matrix.set(values, i * weeks + firstWeek - first);
  });
  return { matrix, weeks };
}

/** The context of one of two equal halves of the work. */
function half({ signal, onProgress }: WorkContext, begun: 0 | 0.5): WorkContext {
  return { signal, onProgress: (progress) => onProgress?.({ ...progress, share: begun + progress.share / 2 }) };
}
