/** The places of a fixed-width file. People count characters from 1 and name the last one; a mapping counts from 0 and
 *  names the one behind it. */
import type { Mapping } from '@/lib/intake/types';

export type Slice = [number, number];

export interface NamedSlice {
  name: SliceName;
  slice: Slice | null;
}

export const SLICE_NAMES = ['date', 'year', 'month', 'day', 'value', 'flag'] as const;
export type SliceName = (typeof SLICE_NAMES)[number];

const PARTS = { y: 'year', m: 'month', d: 'day' } as const;

/** The slices of a mapping by name, in the order of SLICE_NAMES; null for what it has none of. Either the date has one
 *  slice or its three parts have one each. */
export function slicesOf({ date, value, flag }: Mapping): NamedSlice[] {
  const found: Partial<Record<SliceName, Slice>> = {};
  const slices = date.columns.filter((column): column is Slice => Array.isArray(column));
  if (slices.length === 1) found.date = slices[0];
  else for (const [at, slice] of slices.entries()) found[PARTS[date.order[at] as keyof typeof PARTS]] = slice;
  if (value && 'slice' in value) found.value = value.slice;
  if (flag && 'slice' in flag) found.flag = flag.slice;
  const names = SLICE_NAMES.filter((name) =>
    slices.length === 1 ? !['year', 'month', 'day'].includes(name) : name !== 'date',
  );
  return names.map((name) => ({ name, slice: found[name] ?? null }));
}

/** The places that named slices come to.
 *  @returns null while the date or the value has none */
export function placesOfSlices(slices: readonly NamedSlice[], mapping: Mapping): Partial<Mapping> | null {
  const of = (name: SliceName) => slices.find((one) => one.name === name)?.slice ?? null;
  const whole = of('date');
  const parts = [of('year'), of('month'), of('day')].filter((slice) => slice !== null);
  const value = of('value');
  const flag = of('flag');
  if (value === null || (whole === null && parts.length < 3)) return null;
  const date: Mapping['date'] = whole
    ? { ...mapping.date, columns: [whole] }
    : { ...mapping.date, columns: parts, order: 'ymd' };
  return { layout: 'fixed-width', date, value: { slice: value }, flag: flag && { slice: flag } };
}

/** A slice as a person writes it, first and last character from 1.
 *  Example: ('29', '38') → [28, 38] */
export function sliceFrom(first: string, last: string): Slice | null {
  const [from, to] = [Number(first), Number(last)];
  return Number.isInteger(from) && Number.isInteger(to) && from >= 1 && to >= from ? [from - 1, to] : null;
}

/** A stretch of a line, and the slice it belongs to. */
export interface LinePiece {
  text: string;
  start: number;
  name: SliceName | null;
}

/** A line cut where slices begin and end; of slices that overlap, the one that begins first goes before. */
export function piecesOf(line: string, slices: readonly NamedSlice[]): LinePiece[] {
  const cuts = slices
    .flatMap(({ name, slice }) => (slice === null ? [] : [{ name, start: slice[0], end: slice[1] }]))
    .sort((a, b) => a.start - b.start);
  const pieces: LinePiece[] = [];
  let at = 0;
  const add = (end: number, name: SliceName | null) => {
    if (end > at) pieces.push({ text: line.slice(at, end), start: at, name });
    at = Math.max(at, end);
  };
  for (const { name, start, end } of cuts) {
    add(Math.min(start, line.length), null);
    add(Math.min(end, line.length), name);
  }
  add(line.length, null);
  return pieces;
}
