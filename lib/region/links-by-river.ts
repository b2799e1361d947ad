import { distanceKm } from './neighbours.ts';
import type { StationFacts } from './ranking-types.ts';
import { type NearStretch, type RiverGraph, riverGraph, stretchFinder } from './river-graph.ts';
import type { RiverLine } from './river-lines.ts';

/** Two stations with no other between them on the lines of a river layer. */
export interface RiverStep {
  upstream: StationFacts;
  downstream: StationFacts;
  /** along the lines */
  km: number;
}

/** Of two stations on one river the lower one may be given a little less area: areas are measured anew now and then. */
const AREA_SLACK = 0.98;
/** Stations this near to a point of the layer stand on it. */
const AT_POINT_KM = 0.005;
/** A line that bears another river's name is believed only this much nearer: names are spelt in many ways, but a station on
 *  a brook that the layer leaves out must not be put on the river beside it. */
const OTHER_NAME_SHARE = 0.25;
/** Free ends that are tried as mouth of a part whose lines are drawn this way and that. */
const MOST_MOUTHS = 40;
/** Share of the steps that may shrink before the direction of the lines is doubted. */
const MISPLACED_SHARE = 0.2;
/** Stations that do not fit on their line are taken off it, the worst first, at most this often. */
const MOST_ROUNDS = 8;

/** For each station on the lines of a river layer, the next one that its water passes.
 *
 *  Lines are drawn either downstream or upstream; which, each connected part of the layer tells by itself: where most
 *  lines end, and whether drainage areas then grow on the way down. Where lines are drawn both ways, the free end is
 *  taken for the mouth under which most areas grow. Where an area shrinks on the way down, the station that sits worse on
 *  its line is taken off, for it may stand on a brook that the layer leaves out; a step that still shrinks is left out.
 *  @param reachKm  how far from a line a station may stand */
export function riverSteps(
  stations: readonly StationFacts[],
  lines: readonly RiverLine[],
  { reachKm }: { reachKm: number },
): { steps: RiverStep[]; placed: Set<string> } {
  const graph = riverGraph(lines);
  const spots = placeStations(stations, lines, graph, reachKm);
  const steps: RiverStep[] = [];
  const placed = new Set(spots.map(({ station }) => station.code));
  for (let part = 0; part < graph.parts; part += 1) {
    let here = spots.filter((spot) => graph.part[graph.from[spot.stretch]] === part);
    let found: RiverStep[] = [];
    for (let round = 0; round < MOST_ROUNDS && here.length > 1; round += 1) {
      found = stepsOfPart(graph, part, here);
      const misfits = misfitsOf(found, here);
      if (misfits.size === 0) break;
      here = here.filter(({ station }) => !misfits.has(station.code));
      for (const code of misfits) placed.delete(code);
    }
    const kept = new Set(here.map(({ station }) => station.code));
    for (const step of found) {
      const stands = kept.has(step.upstream.code) && kept.has(step.downstream.code);
      if (stands && areaChange(step.upstream, step.downstream) >= 0) steps.push(step);
    }
  }
  return { steps, placed };
}

/** Of each two stations between which the area shrinks, the one that is farther from its line, one on a line of its own
 *  river's name before one that is not. */
function misfitsOf(steps: readonly RiverStep[], spots: readonly Spot[]): Set<string> {
  const spotOf = new Map(spots.map((spot) => [spot.station.code, spot]));
  const badness = ({ code }: StationFacts) => {
    const { named, km } = spotOf.get(code)!;
    return (named ? 0 : 1e6) + km;
  };
  const misfits = new Set<string>();
  for (const { upstream, downstream } of steps) {
    if (areaChange(upstream, downstream) >= 0) continue;
    const [a, b] = [badness(upstream), badness(downstream)];
    if (a !== b) misfits.add(a > b ? upstream.code : downstream.code);
  }
  return misfits;
}

/** Where a station stands: on a stretch, or at one of the layer's points. */
interface Spot {
  station: StationFacts;
  stretch: number;
  share: number;
  /** from the line */
  km: number;
  /** whether the line bears the name of the station's river */
  named: boolean;
  point: number | null;
}

/** Puts each station on a line in reach: one that bears the name of its river before a nearer one that does not. */
function placeStations(
  stations: readonly StationFacts[],
  lines: readonly RiverLine[],
  graph: RiverGraph,
  reachKm: number,
): Spot[] {
  const stretches = Array.from(graph.from, (from, i) => [from, graph.to[i], graph.line[i]] as const);
  const near = stretchFinder(graph, stretches, reachKm);
  const key = (name: string) => name.trim().toLowerCase();
  return stations.flatMap((station): Spot[] => {
    if (station.latitude === null || station.longitude === null) return [];
    const hits = near(station.longitude, station.latitude);
    const river = key(station.river);
    const nameOf = ({ stretch }: NearStretch) => key(lines[graph.line[stretch]].name);
    const named = river === '' ? undefined : hits.find((hit) => nameOf(hit) === river);
    const other = hits.find((hit) => {
      const unlike = river !== '' && nameOf(hit) !== '';
      return hit.km <= (unlike ? OTHER_NAME_SHARE * reachKm : reachKm);
    });
    const hit = named ?? other;
    return hit ? [{ station, ...hit, named: named !== undefined, point: pointAt(graph, station, hit) }] : [];
  });
}

function pointAt({ from, to, lon, lat }: RiverGraph, station: StationFacts, { stretch, share }: NearStretch) {
  const end = share < 0.5 ? from[stretch] : to[stretch];
  const away = distanceKm(station, { latitude: lat[end], longitude: lon[end] });
  return share === 0 || share === 1 || (away !== null && away <= AT_POINT_KM) ? end : null;
}

/** +1 when the area grows (or is not known) from one station to the other, −1 when it shrinks. */
function areaChange(upper: StationFacts, lower: StationFacts): number {
  if (upper.areaKm2 === null || lower.areaKm2 === null) return 0;
  return lower.areaKm2 >= upper.areaKm2 * AREA_SLACK ? 1 : -1;
}

function stepsOfPart(graph: RiverGraph, part: number, spots: readonly Spot[]): RiverStep[] {
  let best: { steps: RiverStep[]; score: number } | null = null;
  for (const mouths of mouthsToTry(graph, part, spots)) {
    const steps = walkDown(graph, flowTo(graph, mouths), spots);
    const changes = steps.map(({ upstream, downstream }) => areaChange(upstream, downstream));
    const score = changes.reduce((sum, change) => sum + (change < 0 ? 2 * change : change), 0);
    if (best === null || score > best.score) best = { steps, score };
    // Lines that all run to one mouth are believed unless areas speak against it; a few may shrink at misplaced stations.
    const shrinking = changes.filter((change) => change < 0).length;
    if (mouths.length === 1 && shrinking <= MISPLACED_SHARE * changes.length) break;
  }
  return best?.steps ?? [];
}

/** Where the water of a part may leave it: where its lines end, where they begin, and each free end alone, those nearest to
 *  the largest catchment first. */
function mouthsToTry(graph: RiverGraph, part: number, spots: readonly Spot[]): number[][] {
  const { part: partOf, start, touching, from } = graph;
  const [ends, begins, free]: number[][] = [[], [], []];
  for (let at = 0; at < partOf.length; at += 1) {
    if (partOf[at] !== part || start[at] === start[at + 1]) continue;
    let leaving = 0;
    for (let k = start[at]; k < start[at + 1]; k += 1) if (from[touching[k]] === at) leaving += 1;
    const all = start[at + 1] - start[at];
    if (leaving === 0) ends.push(at);
    if (leaving === all) begins.push(at);
    if (all === 1) free.push(at);
  }
  const largest = spots.reduce((a, b) => ((b.station.areaKm2 ?? 0) > (a.station.areaKm2 ?? 0) ? b : a)).station;
  const away = (at: number) => distanceKm(largest, { latitude: graph.lat[at], longitude: graph.lon[at] }) ?? 0;
  const nearest = free
    .map((at) => ({ at, km: away(at) }))
    .sort((a, b) => a.km - b.km)
    .slice(0, MOST_MOUTHS);
  const drawn = ends.length <= begins.length ? [ends, begins] : [begins, ends];
  return [...drawn, ...nearest.map(({ at }) => [at])].filter((mouths) => mouths.length > 0);
}

/** The point that each point's water goes to next on the shortest way to a mouth; −1 at mouths and elsewhere. */
function flowTo({ lon, start, touching, from, to }: RiverGraph, mouths: readonly number[]): Int32Array {
  const below = new Int32Array(lon.length).fill(-1);
  const seen = new Uint8Array(lon.length);
  for (const mouth of mouths) seen[mouth] = 1;
  const queue = [...mouths];
  for (let next = 0; next < queue.length; next += 1) {
    const at = queue[next];
    for (let k = start[at]; k < start[at + 1]; k += 1) {
      const other = from[touching[k]] + to[touching[k]] - at;
      if (seen[other] === 1) continue;
      seen[other] = 1;
      below[other] = at;
      queue.push(other);
    }
  }
  return below;
}

/** Goes down from every station to the next one. */
function walkDown(graph: RiverGraph, below: Int32Array, spots: readonly Spot[]): RiverStep[] {
  const { lon, lat, from, to } = graph;
  const length = (a: number, b: number) =>
    distanceKm({ latitude: lat[a], longitude: lon[a] }, { latitude: lat[b], longitude: lon[b] }) ?? 0;
  /** The lower end of a stretch, and how far down it a spot on it stands. */
  const down = ({ stretch, share }: Spot) => {
    const falls = below[from[stretch]] === to[stretch];
    return { lower: falls ? to[stretch] : from[stretch], share: falls ? share : 1 - share };
  };
  const atPoint = new Map<number, Spot[]>();
  const between = new Map<string, Spot[]>();
  const pair = (a: number, b: number) => (a < b ? `${a},${b}` : `${b},${a}`);
  const add = <Key>(map: Map<Key, Spot[]>, key: Key, spot: Spot) => map.set(key, [...(map.get(key) ?? []), spot]);
  for (const spot of spots) {
    if (spot.point !== null) add(atPoint, spot.point, spot);
    else add(between, pair(from[spot.stretch], to[spot.stretch]), spot);
  }
  // Of stations at one point the larger catchment counts as the lower one.
  for (const list of atPoint.values()) list.sort((a, b) => (a.station.areaKm2 ?? 0) - (b.station.areaKm2 ?? 0));
  for (const list of between.values()) list.sort((a, b) => down(a).share - down(b).share);

  return spots.flatMap((spot): RiverStep[] => {
    let km = 0;
    let at: number;
    if (spot.point === null) {
      const { lower, share } = down(spot);
      const list = between.get(pair(from[spot.stretch], to[spot.stretch])) ?? [];
      const whole = length(from[spot.stretch], to[spot.stretch]);
      const next = list[list.indexOf(spot) + 1];
      if (next) return [{ upstream: spot.station, downstream: next.station, km: (down(next).share - share) * whole }];
      km = (1 - share) * whole;
      at = lower;
      const met = atPoint.get(at)?.[0];
      if (met) return [{ upstream: spot.station, downstream: met.station, km }];
    } else {
      at = spot.point;
      const list = atPoint.get(at) ?? [];
      const next = list[list.indexOf(spot) + 1];
      if (next) return [{ upstream: spot.station, downstream: next.station, km: 0 }];
    }
    for (let next = below[at]; next >= 0; at = next, next = below[at]) {
      const [first] = between.get(pair(at, next)) ?? [];
      const whole = length(at, next);
      if (first) {
        return [{ upstream: spot.station, downstream: first.station, km: km + down(first).share * whole }];
      }
      km += whole;
      const met = atPoint.get(next)?.[0];
      if (met) return [{ upstream: spot.station, downstream: met.station, km }];
    }
    return [];
  });
}
