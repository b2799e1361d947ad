import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';

/** Annual minima of many stations laid end to end, so that a few large arrays travel between threads and into the
 *  stored result in place of thousands of small ones. Station i has the entries starts[i] to starts[i + 1]. */
export interface PackedMinima {
  stationIds: Int32Array;
  starts: Int32Array;
  years: Int32Array;
  usable: Uint8Array;
  missingDays: Int32Array;
  minimum: Float64Array;
  day: Int32Array;
  flaggedDays: Int32Array;
  zeroDays: Float64Array;
  meanFlow: Float64Array;
  /** only the reasons that are not empty, with their places among the entries */
  reasonAt: Int32Array;
  reasons: string[];
}

const NUMBER_FIELDS = [
  'years',
  'usable',
  'missingDays',
  'minimum',
  'day',
  'flaggedDays',
  'zeroDays',
  'meanFlow',
] as const;
type NumberField = (typeof NUMBER_FIELDS)[number];

function emptyFields(entries: number): Pick<PackedMinima, NumberField> {
  return {
    years: new Int32Array(entries),
    usable: new Uint8Array(entries),
    missingDays: new Int32Array(entries),
    minimum: new Float64Array(entries),
    day: new Int32Array(entries),
    flaggedDays: new Int32Array(entries),
    zeroDays: new Float64Array(entries),
    meanFlow: new Float64Array(entries),
  };
}

/** Packs minima in the order given. */
export function packMinima(stations: readonly { stationId: number; minima: AnnualMinima }[]): PackedMinima {
  const starts = new Int32Array(stations.length + 1);
  stations.forEach(({ minima }, i) => {
    starts[i + 1] = starts[i] + minima.years.length;
  });
  const fields = emptyFields(starts[stations.length]);
  const reasonAt: number[] = [];
  const reasons: string[] = [];
  stations.forEach(({ minima }, i) => {
    for (const name of NUMBER_FIELDS) fields[name].set(minima[name], starts[i]);
    minima.reason.forEach((reason, year) => {
      if (reason === '') return;
      reasonAt.push(starts[i] + year);
      reasons.push(reason);
    });
  });
  return {
    stationIds: Int32Array.from(stations, ({ stationId }) => stationId),
    starts,
    ...fields,
    reasonAt: Int32Array.from(reasonAt),
    reasons,
  };
}

/** Minima by station; the arrays are views into the packed ones. */
export function unpackMinima(packed: PackedMinima): Map<number, AnnualMinima> {
  const reason = new Array<string>(packed.years.length).fill('');
  packed.reasonAt.forEach((at, i) => {
    reason[at] = packed.reasons[i];
  });
  const result = new Map<number, AnnualMinima>();
  packed.stationIds.forEach((stationId, i) => {
    const from = packed.starts[i];
    const to = packed.starts[i + 1];
    result.set(stationId, {
      years: packed.years.subarray(from, to),
      usable: packed.usable.subarray(from, to),
      missingDays: packed.missingDays.subarray(from, to),
      minimum: packed.minimum.subarray(from, to),
      day: packed.day.subarray(from, to),
      reason: reason.slice(from, to),
      flaggedDays: packed.flaggedDays.subarray(from, to),
      zeroDays: packed.zeroDays.subarray(from, to),
      meanFlow: packed.meanFlow.subarray(from, to),
    });
  });
  return result;
}

/** Figures that run along a pack's years, by station; views into `figures`. */
export function figuresByStation(
  { stationIds, starts }: PackedMinima,
  figures: Float64Array,
): Map<number, Float64Array> {
  return new Map(Array.from(stationIds, (id, i) => [id, figures.subarray(starts[i], starts[i + 1])]));
}

/** One pack of several, in their order. */
export function joinPacked(packs: readonly PackedMinima[]): PackedMinima {
  const all = packs.flatMap((pack) => [...unpackMinima(pack)].map(([stationId, minima]) => ({ stationId, minima })));
  return packMinima(all);
}
