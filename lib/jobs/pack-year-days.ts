import type { YearDays } from '../lowflow/year-days.ts';
import type { FlagName } from '../series/daily-series.ts';

/** Days by year of many stations laid end to end, as minima are. Station i has the entries starts[i] to starts[i + 1]. */
export interface PackedYearDays {
  stationIds: Int32Array;
  starts: Int32Array;
  values: Uint16Array;
  /** only the flags that any day carries */
  flagged: Partial<Record<FlagName, Uint16Array>>;
}

/** Packs the years of stations in the order given; one without a record has none. */
export function packYearDays(stations: readonly { stationId: number; years: YearDays | null }[]): PackedYearDays {
  const starts = new Int32Array(stations.length + 1);
  stations.forEach(({ years }, i) => {
    starts[i + 1] = starts[i] + (years?.values.length ?? 0);
  });
  const entries = starts[stations.length];
  const packed: PackedYearDays = {
    stationIds: Int32Array.from(stations, ({ stationId }) => stationId),
    starts,
    values: new Uint16Array(entries),
    flagged: {},
  };
  stations.forEach(({ years }, i) => {
    if (years === null) return;
    packed.values.set(years.values, starts[i]);
    for (const [name, days] of Object.entries(years.flagged) as [FlagName, Uint16Array][]) {
      if (!days.some((count) => count > 0)) continue;
      packed.flagged[name] ??= new Uint16Array(entries);
      packed.flagged[name].set(days, starts[i]);
    }
  });
  return packed;
}

/** One pack of several, in their order. */
export function joinYearDays(packs: readonly PackedYearDays[]): PackedYearDays {
  const entries = packs.reduce((sum, { values }) => sum + values.length, 0);
  const joined: PackedYearDays = {
    stationIds: Int32Array.from(packs.flatMap(({ stationIds }) => [...stationIds])),
    starts: new Int32Array(1 + packs.reduce((sum, { stationIds }) => sum + stationIds.length, 0)),
    values: new Uint16Array(entries),
    flagged: {},
  };
  let station = 0;
  let entry = 0;
  for (const { starts, values, flagged } of packs) {
    joined.values.set(values, entry);
    for (const [name, days] of Object.entries(flagged) as [FlagName, Uint16Array][]) {
      joined.flagged[name] ??= new Uint16Array(entries);
      joined.flagged[name].set(days, entry);
    }
    for (const end of starts.subarray(1)) joined.starts[++station] = entry + end;
    entry += values.length;
  }
  return joined;
}
