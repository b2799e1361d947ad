import { dateOfDay } from '../lib/calendar/day.ts';
import type { Influence } from '../lib/region/ranking-types.ts';
import type { NamedFlow, StationChange } from '../lib/series/station-history.ts';
import { CELL_KM2 } from './hex-grid.ts';
import { type RandomStream, randomStream } from './random.ts';
import type { Site } from './sites.ts';
import { LAST_YEAR, type Traits } from './traits.ts';

/** What people have done to a station's river, at the station or above it. */
interface History {
  influence: Influence;
  changes: StationChange[];
  namedFlows: NamedFlow[];
}

/** Share of a station's catchment that lies above a dam, an intake or an outfall, from which its water counts as changed. */
const LEAST_SHARE = 0.01;

/** Influence, dated changes and named flows of station `i`: its own, and what comes down from the stations above. */
export function historyOf(
  seed: number,
  i: number,
  sites: readonly Site[],
  traits: readonly Traits[],
  codes: readonly string[],
): History {
  const above = sites
    .map((site, k) => ({ k, share: site.cells / sites[i].cells }))
    .filter(({ k, share }) => share >= LEAST_SHARE && deedOf(traits[k]) !== null && drainsTo(sites, k, i))
    .sort((a, b) => b.share - a.share);
  const changes = ownChanges(traits[i]);
  for (const { k } of above) {
    const { date, kind, from } = deedOf(traits[k])!;
    changes.push({ date, kind, note: `${from} ${codes[k]}, upstream.` });
  }
  const atGauge = gaugeChange(traits[i], randomStream(seed, 'gauge history', i));
  if (atGauge) changes.push(atGauge);
  const own = traits[i].influence;
  return {
    influence: above.length > 0 && (own === 'natural' || own === 'unknown') ? deedOf(traits[above[0].k])!.below : own,
    changes: changes.sort((a, b) => (a.date < b.date ? -1 : Number(a.date > b.date))),
    namedFlows: namedFlowsOf(i, sites[i], traits[i]),
  };
}

function drainsTo(sites: readonly Site[], from: number, to: number): boolean {
  for (let at = sites[from].below; at >= 0; at = sites[at].below) if (at === to) return true;
  return false;
}

/** What a site does to the water below it; null for nothing. */
function deedOf({ damYear, abstraction, returnFlow }: Traits) {
  const dated = (year: number) => `${year}-01-01`;
  if (damYear !== null) {
    return { date: dated(damYear), kind: 'dam', below: 'regulated', from: 'Reservoir filled at' } as const;
  }
  if (abstraction) {
    const date = dated(abstraction.fromYear);
    return { date, kind: 'abstraction', below: 'abstracted', from: 'Water works began to pump at' } as const;
  }
  if (returnFlow) {
    const date = dated(returnFlow.fromYear);
    return { date, kind: 'discharge', below: 'augmented', from: 'Treated water let in at' } as const;
  }
  return null;
}

function ownChanges({ damYear, abstraction, returnFlow }: Traits): StationChange[] {
  const changes: StationChange[] = [];
  if (damYear) changes.push({ date: `${damYear}-01-01`, kind: 'dam', note: 'Reservoir above the station filled.' });
  if (abstraction) {
    changes.push({ date: `${abstraction.fromYear}-01-01`, kind: 'abstraction', note: 'Water works began to pump.' });
  }
  if (returnFlow) {
    const note = 'The town lets treated water in that it brought from elsewhere.';
    changes.push({ date: `${returnFlow.fromYear}-01-01`, kind: 'discharge', note });
  }
  return changes;
}

/** One gauge in four was rebuilt, moved or rated anew. The records were adjusted: their flows show nothing of it. */
function gaugeChange({ firstDay, lastDay }: Traits, random: RandomStream): StationChange | null {
  if (random.uniform() > 0.25) return null;
  const first = dateOfDay(firstDay).year + 5;
  const last = Math.min(LAST_YEAR, dateOfDay(lastDay).year) - 5;
  if (first >= last) return null;
  const [kind, note] = (
    [
      ['weir changed', 'The weir was rebuilt; levels from here on are higher.'],
      ['rating changed', 'New rating after a flood scoured the bed.'],
      ['gauge moved', 'The gauge was moved below the new bridge.'],
    ] as const
  )[random.below(3)];
  const month = 1 + random.below(12);
  return { date: `${first + random.below(last - first)}-${String(month).padStart(2, '0')}-01`, kind, note };
}

/** Flows that mean something here, by area: about what the smallest years of such rivers bring. */
function namedFlowsOf(i: number, site: Site, { damYear, abstraction, returnFlow }: Traits): NamedFlow[] {
  const flow = (litresPerKm2: number) => Number(((site.cells * CELL_KM2 * litresPerKm2) / 1000).toPrecision(2));
  const summer = [5, 6, 7, 8, 9, 10];
  const flows: NamedFlow[] = [];
  if (i === 0) {
    const value = flow(4.5);
    flows.push({ name: 'Least flow to the sea', kind: 'legal minimum', value, unit: 'm3/s', months: null });
  }
  if (damYear !== null) {
    const value = flow(4);
    flows.push({ name: 'Release below the dam', kind: 'residual flow', value, unit: 'm3/s', months: null });
  }
  if (abstraction) {
    const stop = { name: 'Pumping stops', kind: 'abstraction stop', months: summer } as const;
    // A small works counts in litres.
    const value = flow(3);
    if (value < 1) flows.push({ ...stop, value: Math.round(1000 * value), unit: 'L/s' });
    else flows.push({ ...stop, value, unit: 'm3/s' });
    const level = flow(1.5);
    flows.push({ name: 'Intake runs dry', kind: 'intake level', value: level, unit: 'm3/s', months: null });
  }
  if (returnFlow) {
    const value = flow(5);
    flows.push({ name: 'Dilution of the outfall', kind: 'legal minimum', value, unit: 'm3/s', months: null });
  }
  return flows;
}
