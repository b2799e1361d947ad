import { FLAG } from '../series/daily-series.ts';
import { type DayCode, NO_ROW } from '../series/day-codes.ts';
import { type Quantity, toShownUnit, type Unit } from '../series/quantities.ts';

/** What an import does on a day that holds a value already, when its own is another one.
 *  keep: leave it · take-new: replace it · take-where-provisional: replace it when it is provisional */
export const OVERLAP_RULES = ['keep', 'take-new', 'take-where-provisional'] as const;
export type OverlapRule = (typeof OVERLAP_RULES)[number];

/** One import's days of one station, as written. */
export interface LayablePart {
  unit: Unit;
  firstDay: number;
  values: Float64Array;
  codes: Uint8Array;
  codeList: readonly DayCode[];
  rule: OverlapRule;
}

export interface LaidDays {
  unit: Unit;
  firstDay: number;
  values: Float64Array;
  /** flag bits a day */
  flags: Uint8Array;
}

/** What a part came upon, day by day, when it was laid over those before it. */
export interface LaidCounts {
  /** days on which there was no value before: outside the days that had one, and between them */
  extended: number;
  filled: number;
  /** days whose value is equal to the one that stood */
  equal: number;
  /** days whose value is unlike the one that stood, those of them that stood as provisional, and those that take the new
   *  value under the rule */
  unlike: number;
  unlikeProvisional: number;
  revised: number;
}

/** A day on which a part has another value than the record had by then; both in the record's unit. */
export interface UnlikeDay {
  day: number;
  standing: number;
  other: number;
}

/** Told of what each part comes upon; `part` is its place in the list. */
export interface LayWatcher {
  unlike?(part: number, day: UnlikeDay): void;
  laid?(part: number, counts: LaidCounts): void;
}

export interface LayOptions {
  quantity?: Quantity;
  /** drainage area, for depths over it */
  areaKm2: number | null;
  watcher?: LayWatcher;
}

/** More than rounding in the conversion of units, less than the last digit of any gauge. */
const UNIT_TOLERANCE = 1e-9;

/** What is known of a day's quality code: nothing, a row without a code, a code. */
const NONE = 0;
const BLANK = 1;
const STATED = 2;

/** Lays parts over one another in the order given, in the unit of the first.
 *
 *  A day without a value takes the value and code of the next part that has one. A missing value never takes a value's
 *  place. Where values are equal, a code fills in where none was stated, and replaces the one that stands where the
 *  part's rule lets its value do so (a row without a code only ends a provisional one). Where they are unlike, the part's rule decides.
 *  @throws RangeError for no parts, for a unit that the quantity does not come in, or when a depth over the area must be
 *          converted and there is no area */
export function layParts(
  parts: readonly LayablePart[],
  { quantity = 'flow', areaKm2, watcher = {} }: LayOptions,
): LaidDays {
  if (parts.length === 0) throw new RangeError('layParts: parts must hold at least one part, got none');
  const { unit } = parts[0];
  const firstDay = Math.min(...parts.map((part) => part.firstDay));
  const days = Math.max(...parts.map((part) => part.firstDay + part.values.length)) - firstDay;
  const laid: LaidDays = {
    unit,
    firstDay,
    values: new Float64Array(days).fill(Number.NaN),
    flags: new Uint8Array(days),
  };
  const stated = new Uint8Array(days);
  for (const [index, part] of parts.entries()) {
    const factor = conversion(quantity, { from: part.unit, to: unit, areaKm2 });
    const counts = layOver(laid, stated, { part, factor }, (day) => watcher.unlike?.(index, day));
    watcher.laid?.(index, counts);
  }
  return laid;
}

function conversion(
  quantity: Quantity,
  { from, to, areaKm2 }: { from: Unit; to: Unit; areaKm2: number | null },
): number {
  if (from === to) return 1;
  const factor = toShownUnit(quantity, from, areaKm2) / toShownUnit(quantity, to, areaKm2);
  if (!(factor > 0))
    throw new RangeError(`layParts: areaKm2 must be positive to turn ${from} into ${to}, got ${areaKm2}`);
  return factor;
}

function layOver(
  { values, flags, firstDay }: LaidDays,
  stated: Uint8Array,
  { part, factor }: { part: LayablePart; factor: number },
  onUnlike: (day: UnlikeDay) => void,
): LaidCounts {
  const bits = new Uint8Array(256);
  const hasCode = new Uint8Array(256).fill(BLANK);
  for (const [index, code] of part.codeList.entries()) {
    bits[index] = code.bits;
    if (code.text !== '') hasCode[index] = STATED;
  }
  const { values: given, codes, rule } = part;
  const offset = part.firstDay - firstDay;
  const [first, last] = ends(values);
  // Plain numbers: this loop runs once a day of every record.
  let [extended, filled, equal, unlike, unlikeProvisional, revised] = [0, 0, 0, 0, 0, 0];
  for (let day = 0; day < given.length; day++) {
    const code = codes[day];
    if (code === NO_ROW) continue;
    const at = offset + day;
    const value = factor === 1 ? given[day] : given[day] * factor;
    const standing = values[at];
    const replaces = mayReplace(rule, flags[at]);
    let takesCode: boolean;
    if (Number.isNaN(standing)) {
      values[at] = value;
      takesCode = !Number.isNaN(value) || stated[at] < STATED;
      if (!Number.isNaN(value)) {
        if (at < first || at > last) extended++;
        else filled++;
      }
    } else if (Number.isNaN(value)) {
      takesCode = false;
    } else if (isSame(standing, value, factor === 1)) {
      equal++;
      takesCode =
        hasCode[code] === STATED ? replaces || stated[at] < STATED : replaces && rule === 'take-where-provisional';
    } else {
      unlike++;
      if ((flags[at] & FLAG.provisional) !== 0) unlikeProvisional++;
      if (replaces) {
        values[at] = value;
        revised++;
      }
      takesCode = replaces;
      onUnlike({ day: firstDay + at, standing, other: value });
    }
    if (takesCode) {
      flags[at] = bits[code];
      stated[at] = hasCode[code];
    } else if (stated[at] === NONE) stated[at] = BLANK;
  }
  return { extended, filled, equal, unlike, unlikeProvisional, revised };
}

/** Places of the first and the last value; where there is none every day lies before the first. */
function ends(values: Float64Array): [number, number] {
  let first = 0;
  let last = values.length - 1;
  while (first < values.length && Number.isNaN(values[first])) first++;
  while (last >= 0 && Number.isNaN(values[last])) last--;
  return [first, last];
}

const mayReplace = (rule: OverlapRule, flags: number): boolean =>
  rule === 'take-new' || (rule === 'take-where-provisional' && (flags & FLAG.provisional) !== 0);

/** Equal values. After a conversion of units so within a billionth of the larger. */
export function isSame(a: number, b: number, exactly: boolean): boolean {
  return a === b || (!exactly && Math.abs(a - b) <= UNIT_TOLERANCE * Math.max(Math.abs(a), Math.abs(b)));
}
