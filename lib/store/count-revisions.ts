import { isoDate } from '../calendar/day.ts';
import type { Unit } from '../series/quantities.ts';
import type { LaidCounts, UnlikeDay } from './lay-parts.ts';
import type { Revisions, StationRevisions } from './revisions.ts';

/** Stations named at most: the ones with the largest changes. */
const MOST_STATIONS = 100;
/** Days named at most in a refusal. */
const SHOWN = 3;

/** A day on which a file has another value than the record. Both in the record's unit. */
export interface Conflict {
  code: string;
  /** ISO date */
  date: string;
  standing: number;
  other: number;
  unit: Unit;
}

interface StationCount {
  code: string;
  unit: Unit;
  unlike: number;
  first: number;
  last: number;
  largest: UnlikeDay;
}

/** Counts what one file does to the days of the records it comes to. */
export class RevisionCounter {
  private readonly total: LaidCounts = {
    extended: 0,
    filled: 0,
    equal: 0,
    unlike: 0,
    unlikeProvisional: 0,
    revised: 0,
  };
  private readonly stations = new Map<string, StationCount>();
  /** the first days with unlike values */
  readonly firstUnlike: Conflict[] = [];

  get unlike(): number {
    return this.total.unlike;
  }

  /** Days of a record that there was none of before. */
  extend(days: number): void {
    this.total.extended += days;
  }

  add(counts: LaidCounts): void {
    for (const key of Object.keys(counts) as (keyof LaidCounts)[]) this.total[key] += counts[key];
  }

  addUnlike({ code, quantity, unit }: { code: string; quantity: string; unit: Unit }, at: UnlikeDay): void {
    const { day, ...values } = at;
    if (this.firstUnlike.length < SHOWN) this.firstUnlike.push({ code, date: isoDate(day), ...values, unit });
    const key = `${quantity} ${code}`;
    const station = this.stations.get(key) ?? { code, unit, unlike: 0, first: day, last: day, largest: at };
    this.stations.set(key, station);
    station.unlike++;
    station.first = Math.min(station.first, day);
    station.last = Math.max(station.last, day);
    if (Math.abs(at.other - at.standing) > Math.abs(station.largest.other - station.largest.standing))
      station.largest = at;
  }

  revisions(): Revisions {
    const changed = [...this.stations.values()].sort(
      (a, b) => shareOf(b.largest) - shareOf(a.largest) || b.unlike - a.unlike || (a.code < b.code ? -1 : 1),
    );
    return { ...this.total, stations: changed.slice(0, MOST_STATIONS).map(toRevisions) };
  }
}

/** A change as a share of the larger of both values: comparable between rivers and quantities. */
const shareOf = ({ standing, other }: UnlikeDay): number =>
  Math.abs(other - standing) / Math.max(Math.abs(standing), Math.abs(other));

function toRevisions({ code, unit, unlike, first, last, largest }: StationCount): StationRevisions {
  const { day, standing, other } = largest;
  return {
    ...{ code, unlike, first: isoDate(first), last: isoDate(last) },
    largest: { date: isoDate(day), standing, other, unit },
  };
}
