import { isoDate } from '../calendar/day.ts';
import { csvLine } from '../intake/csv-line.ts';
import { flagBits } from '../intake/flags.ts';
import { isMissingText } from '../intake/missing-codes.ts';
import type { AlsoQuantity, Mapping, Quantity, StagedPart, Unit } from '../intake/types.ts';
import { FLAG, FLAG_NAMES } from '../series/daily-series.ts';
import { type DayCode, NO_ROW } from '../series/day-codes.ts';

const HEADER = ['station_code', 'quantity', 'date', 'value', 'unit', 'flag'] as const;

/** Days as a file had them, of one station and quantity. */
export type WrittenPart = Pick<StagedPart, 'code' | 'unit' | 'firstDay' | 'values' | 'codes'> & {
  quantity?: string;
  codeList: readonly DayCode[];
};

/** Parts as one long table: a line for every day that its file had a line for, with the value, the unit and the flag as
 *  written there. Numbers are the shortest that read back as the same ones. Read by the mapping of `flowsMapping`, it gives
 *  the same parts again. */
export function* flowsCsv(parts: Iterable<WrittenPart>): Generator<string> {
  yield csvLine([...HEADER]);
  const dates = new Map<number, string>();
  const dateOf = (day: number): string => {
    const known = dates.get(day);
    if (known !== undefined) return known;
    const date = isoDate(day);
    dates.set(day, date);
    return date;
  };
  for (const part of parts) yield* partLines(part, dateOf);
}

function* partLines(part: WrittenPart, dateOf: (day: number) => string): Generator<string> {
  const { values, codes, firstDay, codeList } = part;
  const before = csvLine([part.code, part.quantity ?? 'flow']).trimEnd();
  const unit = csvLine([part.unit]).trimEnd();
  const flags = codeList.map((code) => csvLine([oneLine(flagText(code))]).trimEnd());
  let lines = '';
  for (let at = 0; at < values.length; at++) {
    const code = codes[at];
    if (code === NO_ROW) continue;
    const value = valueText(values[at], codeList[code].valueText);
    lines += `${before},${dateOf(firstDay + at)},${value},${unit},${flags[code]}\r\n`;
    if (lines.length < 1 << 16) continue;
    yield lines;
    lines = '';
  }
  yield lines;
}

/** The flag's own text: where a row had none, the text that stood in the value's place is not one. */
function flagText({ text, valueText: inValue }: DayCode): string {
  return inValue !== undefined && text === inValue ? '' : text;
}

function valueText(value: number, written: string | undefined): string {
  if (Number.isNaN(value)) return written === undefined || written === '<' ? '' : csvLine([oneLine(written)]).trimEnd();
  const plain = String(value);
  // A flow of exactly −99 is a number here, and must not be taken for a missing one.
  const text = value < 0 && isMissingText(plain) ? value.toExponential() : plain;
  return written === '<' ? `<${text}` : text;
}

const oneLine = (text: string): string => text.replace(/[\r\n]+/g, ' ');

/** How a table by `flowsCsv` is to be read, so that the same parts come of it.
 *  @param parts  what the table was written from; only units and codes are looked at
 *  @throws RangeError when a quantity comes in two units: a table has one for each */
export function flowsMapping(parts: Iterable<Pick<WrittenPart, 'quantity' | 'unit' | 'codeList'>>): Mapping {
  const units = new Map<Quantity, Unit>();
  const missing = new Set<string>();
  const flags: NonNullable<Mapping['flags']> = {};
  for (const { quantity = 'flow', unit, codeList } of parts) {
    const standing = units.get(quantity as Quantity);
    if (standing !== undefined && standing !== unit) {
      throw new RangeError(`flowsMapping: ${quantity} must come in one unit, got ${standing} and ${unit}`);
    }
    units.set(quantity as Quantity, unit);
    for (const code of codeList) {
      const { valueText: inValue } = code;
      if (inValue !== undefined && inValue !== '<' && !isMissingText(inValue)) missing.add(oneLine(inValue));
      Object.assign(flags, meaningOf(code));
    }
  }
  const [first = ['flow', 'm3/s'] as const, ...others] = units;
  const of = (quantity: Quantity) => ({ where: { column: 'quantity', equals: quantity } });
  const also = others.map(
    ([quantity, unit]): AlsoQuantity => ({ quantity, unit, value: { column: 'value' }, ...of(quantity) }),
  );
  return {
    layout: 'long',
    station: { from: 'column', column: 'station_code' },
    date: { columns: ['date'], order: 'ymd' },
    ...{ value: { column: 'value' }, flag: { column: 'flag' }, unit: first[1], missing: [...missing], decimal: '.' },
    ...{ delimiter: ',', quantity: first[0], ...of(first[0]) },
    ...(Object.keys(flags).length > 0 ? { flags } : {}),
    ...(also.length > 0 ? { also } : {}),
  };
}

/** What a code's texts must be said to mean; nothing where its words say it by themselves. */
function meaningOf(code: DayCode): NonNullable<Mapping['flags']> {
  const flag = oneLine(flagText(code));
  const inValue = code.valueText ?? '';
  if ((flagBits(flag) | flagBits(inValue)) === code.bits) return {};
  const own = flag === '' ? code.bits : code.bits & ~flagBits(inValue);
  return { [flag === '' ? oneLine(inValue) : flag]: FLAG_NAMES.filter((name) => (own & FLAG[name]) !== 0) };
}
