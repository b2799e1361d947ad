import { parseIsoDate } from '../calendar/day.ts';
import { INFLUENCES } from '../region/ranking-types.ts';
import { FLOW_UNITS } from '../series/flow-units.ts';
import { QUANTITIES } from '../series/quantities.ts';
import {
  CHANGE_KINDS,
  type DerivedRecipe,
  NAMED_FLOW_KINDS,
  type NamedFlow,
  type StationChange,
} from '../series/station-history.ts';
import { StoreError } from './errors.ts';
import type { StationInput } from './station-facts.ts';

/** What may be changed of a station: a key that is absent stays as it is. */
export type StationPatch = Omit<StationInput, 'code'>;

/** Longest text taken, characters. */
const MOST_TEXT = 10_000;
const MOST_NAME = 200;
/** Longest travel time between two gauges, days. */
const MOST_LAG = 366;

/** Looks at every value of a change to a station.
 *  @throws StoreError 'bad-input' naming the value and what would do */
export function checkStation(patch: StationPatch): void {
  const { name, river, notes, latitude, longitude, areaKm2, influence } = patch;
  if (name !== undefined && name.trim() === '') refuse('A station needs a name.');
  for (const [what, text, most] of [
    ['The name', name, MOST_NAME],
    ['The river', river, MOST_NAME],
    ['The note', notes, MOST_TEXT],
  ] as const) {
    if ((text?.length ?? 0) > most) refuse(`${what} is longer than ${most} characters.`);
  }
  degrees('latitude', latitude, 90);
  degrees('longitude', longitude, 180);
  if (areaKm2 != null && !(areaKm2 > 0 && Number.isFinite(areaKm2))) {
    refuse(`A drainage area is more than 0 km², and ${areaKm2} is not; leave it empty where there is none.`);
  }
  if (influence !== undefined && !INFLUENCES.includes(influence)) {
    refuse(`The influence is one of ${INFLUENCES.join(', ')}, not "${influence}".`);
  }
  for (const change of patch.changes ?? []) checkChange(change);
  checkNamedFlows(patch.namedFlows ?? []);
  if (patch.derived) checkRecipeValues(patch.derived);
}

function degrees(what: string, value: number | null | undefined, most: number): void {
  if (value == null || Math.abs(value) <= most) return;
  refuse(`The ${what} lies between −${most} and ${most} degrees, and ${value} does not.`);
}

function checkChange({ date, kind, note }: StationChange): void {
  if (Number.isNaN(parseIsoDate(date))) refuse(`A change needs its date as YYYY-MM-DD, and "${date}" is none.`);
  if (!CHANGE_KINDS.includes(kind)) refuse(`A change is one of ${CHANGE_KINDS.join(', ')}, not "${kind}".`);
  if (note.length > MOST_TEXT) refuse(`The note on the change of ${date} is longer than ${MOST_TEXT} characters.`);
}

function checkNamedFlows(flows: readonly NamedFlow[]): void {
  const names = new Set<string>();
  for (const { name, kind, value, unit, months } of flows) {
    if (name.trim() === '' || name.length > MOST_NAME)
      refuse(`A named flow needs a name of 1–${MOST_NAME} characters.`);
    if (names.has(name)) refuse(`Two named flows are called "${name}"; give each a name of its own.`);
    names.add(name);
    if (!NAMED_FLOW_KINDS.includes(kind)) {
      refuse(`The named flow "${name}" is one of ${NAMED_FLOW_KINDS.join(', ')}, not "${kind}".`);
    }
    if (!(value >= 0 && Number.isFinite(value)))
      refuse(`The named flow "${name}" needs a value of 0 or more, not ${value}.`);
    if (!FLOW_UNITS.includes(unit))
      refuse(`The named flow "${name}" comes in ${FLOW_UNITS.join(', ')}, not "${unit}".`);
    const right = months === null || (months.length > 0 && new Set(months).size === months.length);
    if (!right || months?.some((month) => !Number.isInteger(month) || month < 1 || month > 12)) {
      refuse(
        `The months of the named flow "${name}" are numbers from 1 to 12, each once; leave them out for all year.`,
      );
    }
  }
}

function checkRecipeValues({ quantity, terms, note }: DerivedRecipe): void {
  if (!QUANTITIES.includes(quantity)) {
    refuse(`A derived record is of ${QUANTITIES.join(', ')}, not of "${quantity}".`);
  }
  if (terms.length === 0) refuse('A derived record needs at least one station that it comes from.');
  if (note.length > MOST_TEXT) refuse(`The note on the recipe is longer than ${MOST_TEXT} characters.`);
  for (const { code, factor, lagDays } of terms) {
    if (!Number.isFinite(factor) || factor === 0) {
      refuse(`The factor of ${code} is a number other than 0, and ${factor} is not.`);
    }
    if (!Number.isInteger(lagDays) || Math.abs(lagDays) > MOST_LAG) {
      refuse(`The lag of ${code} is a whole number of days up to ${MOST_LAG}, and ${lagDays} is not.`);
    }
  }
}

function refuse(message: string): never {
  throw new StoreError('bad-input', message);
}
