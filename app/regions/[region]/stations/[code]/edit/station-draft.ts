import { parseIsoDate } from '@/lib/calendar/day';
import type { Influence } from '@/lib/region/ranking-types';
import { type AreaUnit, KM2_OF } from '@/lib/series/area-units';
import type { FlowUnit } from '@/lib/series/flow-units';
import type { ChangeKind, NamedFlow, NamedFlowKind, StationChange } from '@/lib/series/station-history';

/** A row of a list, told apart from its neighbours while they are edited. */
interface Row {
  key: number;
}
export interface ChangeDraft extends Row {
  date: string;
  kind: ChangeKind;
  note: string;
}
export interface FlowDraft extends Row {
  name: string;
  kind: NamedFlowKind;
  value: string;
  unit: FlowUnit;
  /** 1 to 12; all twelve: all year */
  months: number[];
}

/** A station's facts as they stand in the fields: text, whatever was typed. */
export interface StationDraft {
  name: string;
  river: string;
  latitude: string;
  longitude: string;
  area: string;
  areaUnit: AreaUnit;
  influence: Influence;
  changes: ChangeDraft[];
  flows: FlowDraft[];
  notes: string;
}

/** The facts that this form changes. */
export interface EditableFacts {
  name: string;
  river: string;
  latitude: number | null;
  longitude: number | null;
  areaKm2: number | null;
  influence: Influence;
  changes: StationChange[];
  namedFlows: NamedFlow[];
  notes: string;
}

export const ALL_YEAR = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12];

export function draftOf(station: EditableFacts): StationDraft {
  const text = (value: number | null) => (value === null ? '' : String(value));
  return {
    name: station.name,
    river: station.river,
    latitude: text(station.latitude),
    longitude: text(station.longitude),
    area: text(station.areaKm2),
    areaUnit: 'km²',
    influence: station.influence,
    changes: station.changes.map((change, key) => ({ key, ...change })),
    flows: station.namedFlows.map(({ value, months, ...flow }, key) => ({
      ...{ key, ...flow, value: String(value) },
      months: months ?? ALL_YEAR,
    })),
    notes: station.notes,
  };
}

/** What is wrong, by the field it is said beside: `latitude`, `changes.3.date`, the number being the row's key. */
export type Problems = Record<string, string>;

/** What the fields say, as a change of the facts that were read: only what differs from them; or what is wrong. */
export function readDraft(
  draft: StationDraft,
  from: EditableFacts,
): { patch: Partial<EditableFacts>; problems: Problems } {
  const problems: Problems = {};
  const number = (field: string, text: string, wanted: string, fits: (value: number) => boolean): number => {
    const value = readNumber(text);
    if (!fits(value)) problems[field] = wanted;
    return value;
  };
  const degrees = (field: 'latitude' | 'longitude', most: number): number | null => {
    if (draft[field].trim() === '') return null;
    const wanted = `Degrees from −${most} to ${most}, such as 46.25, or nothing.`;
    return number(field, draft[field], wanted, (value) => Math.abs(value) <= most);
  };
  const areaOf = (): number | null => {
    if (draft.area.trim() === '') return null;
    // What nobody touched stays as it was read, to the last digit.
    if (draft.areaUnit === 'km²' && from.areaKm2 !== null && draft.area === String(from.areaKm2)) return from.areaKm2;
    const wanted = 'A number above 0 with a decimal point, or nothing where no area means anything.';
    return number('area', draft.area, wanted, (value) => value > 0) * KM2_OF[draft.areaUnit];
  };

  const facts: EditableFacts = {
    name: draft.name.trim(),
    river: draft.river.trim(),
    latitude: degrees('latitude', 90),
    longitude: degrees('longitude', 180),
    areaKm2: areaOf(),
    influence: draft.influence,
    changes: readChanges(draft.changes, problems),
    namedFlows: readFlows(draft.flows, problems),
    notes: draft.notes.trim(),
  };
  if (facts.name === '') problems.name = 'A station needs a name.';
  if ((facts.latitude === null) !== (facts.longitude === null)) {
    problems[facts.latitude === null ? 'latitude' : 'longitude'] = 'A place has a latitude and a longitude.';
  }
  if (facts.areaKm2 === null) {
    for (const { key, unit } of draft.flows) {
      if (unit === 'mm/d') problems[`flows.${key}.value`] ??= 'A depth in mm/d needs the drainage area above.';
    }
  }
  return { patch: Object.keys(problems).length > 0 ? {} : differing(facts, from), problems };
}

/** A number with a decimal point; NaN for anything else, so that 1,234 is asked about and not guessed. */
function readNumber(text: string): number {
  const plain = text.trim().replace('−', '-');
  return /^-?(\d+\.?\d*|\.\d+)(e-?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN;
}

function readChanges(rows: readonly ChangeDraft[], problems: Problems): StationChange[] {
  return rows.map(({ key, date, kind, note }) => {
    if (Number.isNaN(parseIsoDate(date.trim()))) problems[`changes.${key}.date`] = 'A day as YYYY-MM-DD.';
    return { date: date.trim(), kind, note: note.trim() };
  });
}

function readFlows(rows: readonly FlowDraft[], problems: Problems): NamedFlow[] {
  const names = rows.map(({ name }) => name.trim());
  return rows.map(({ key, kind, unit, value: text, months }, index) => {
    const name = names[index];
    if (name === '') problems[`flows.${key}.name`] = 'A named flow needs a name.';
    else if (names.indexOf(name) !== index) problems[`flows.${key}.name`] = 'Another flow has this name already.';
    const value = readNumber(text);
    if (!(value >= 0)) problems[`flows.${key}.value`] = 'A number of at least 0 with a decimal point.';
    if (months.length === 0) problems[`flows.${key}.months`] = 'At least one month.';
    return { name, kind, value, unit, months: months.length === 12 ? null : [...months].sort((a, b) => a - b) };
  });
}

function differing(facts: EditableFacts, from: EditableFacts): Partial<EditableFacts> {
  const names = Object.keys(facts) as (keyof EditableFacts)[];
  return Object.fromEntries(
    names
      .filter((name) => JSON.stringify(facts[name]) !== JSON.stringify(from[name]))
      .map((name) => [name, facts[name]]),
  );
}
