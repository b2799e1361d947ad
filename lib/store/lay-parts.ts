import { FLAG } from '../series/daily-series.ts';
import type { FlowUnit } from '../series/flow-units.ts';
import { toM3s } from '../series/flow-units.ts';
import type { Unit } from '../series/quantities.ts';
import { type Code, NO_ROW } from './codes.ts';

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
  codeList: readonly Code[];
  rule: OverlapRule;
}

export interface LaidDays {
  unit: Unit;
  firstDay: number;
  values: Float64Array;
  /** flag bits a day */
  flags: Uint8Array;
}

/** Told of every day on which a part with the rule "keep" has another value than the record; both in the record's unit.
 *  `part` is the part's place in the list. */
export type OnConflict = (part: number, day: number, standing: number, other: number) => void;

/** Values of unlike units count as equal within this share of the larger: more than rounding in the conversion, less
 *  than the last digit of any gauge. */
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
 *  @param areaKm2  drainage area, for depths over it
 *  @throws RangeError for no parts, or when a depth must be converted and there is no area */
export function layParts(parts: readonly LayablePart[], areaKm2: number | null, onConflict?: OnConflict): LaidDays {
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
    layOver(laid, stated, part, conversion(part.unit, unit, areaKm2), (day, standing, other) =>
      onConflict?.(index, day, standing, other),
    );
  }
  return laid;
}

function conversion(from: Unit, to: Unit, areaKm2: number | null): number {
  if (from === to) return 1;
  const factor = toM3s(from as FlowUnit, areaKm2) / toM3s(to as FlowUnit, areaKm2);
  if (!(factor > 0))
    throw new RangeError(`layParts: areaKm2 must be positive to turn ${from} into ${to}, got ${areaKm2}`);
  return factor;
}

function layOver(
  { values, flags, firstDay }: LaidDays,
  stated: Uint8Array,
  part: LayablePart,
  factor: number,
  onConflict: (day: number, standing: number, other: number) => void,
): void {
  const bits = new Uint8Array(256);
  const hasCode = new Uint8Array(256).fill(BLANK);
  for (const [index, code] of part.codeList.entries()) {
    bits[index] = code.bits;
    if (code.text !== '') hasCode[index] = STATED;
  }
  const { values: given, codes, rule } = part;
  const offset = part.firstDay - firstDay;
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
    } else if (Number.isNaN(value)) {
      takesCode = false;
    } else if (isSame(standing, value, factor === 1)) {
      takesCode =
        hasCode[code] === STATED ? replaces || stated[at] < STATED : replaces && rule === 'take-where-provisional';
    } else if (replaces) {
      values[at] = value;
      takesCode = true;
    } else {
      if (rule === 'keep') onConflict(firstDay + at, standing, value);
      takesCode = false;
    }
    if (takesCode) {
      flags[at] = bits[code];
      stated[at] = hasCode[code];
    } else if (stated[at] === NONE) stated[at] = BLANK;
  }
}

const mayReplace = (rule: OverlapRule, flags: number): boolean =>
  rule === 'take-new' || (rule === 'take-where-provisional' && (flags & FLAG.provisional) !== 0);

function isSame(a: number, b: number, exactly: boolean): boolean {
  return a === b || (!exactly && Math.abs(a - b) <= UNIT_TOLERANCE * Math.max(Math.abs(a), Math.abs(b)));
}
