import { areaFactorOf } from '../registry/registry-columns.ts';
import type { FoundFacts, StatedFacts } from '../types.ts';
import { type FactKind, factOfKey } from './fact-words.ts';

/** A key and its value, as a line above a table has them: "Station: Mill Bridge". */
export interface StatedPair {
  key: string;
  value: string;
}

const NOTHING = /^(?:-+|n\/?a|n\.a\.|unknown|none|-?9{3,}(?:\.0*)?)?$/i;

/** The key and value of a line; null when it has another form.
 *  @param delimiter  of the table below, which may set keys apart too */
export function pairOf(text: string, delimiter: string | null): StatedPair | null {
  const plain = withoutSign(text);
  const clean = (part: string) => part.replace(/[;,\t"]+$/, '').replace(/^[\s"]+|[\s"]+$/g, '');
  for (const mark of [':', '=', '\t', ...(delimiter === null || delimiter === '\t' ? [';'] : [delimiter])]) {
    const at = plain.indexOf(mark);
    if (at <= 0 || at > 60) continue;
    const key = clean(plain.slice(0, at));
    const value = clean(plain.slice(at + 1).replace(/^[\s:;,=\t]+/, ''));
    if (key === '' || value === '') return null;
    // Further fields of the line are empty, or of other matters.
    return { key, value: delimiter === null ? value : clean(value.split(delimiter)[0]) };
  }
  return null;
}

/** A line without the sign of a comment, and the quotes that a spreadsheet put around it. */
export function withoutSign(text: string): string {
  return text.replace(/^[\s"]*(?:\/\/|[#%;*!']+)?\s*/, '').replace(/"\s*$/, '');
}

/** Pairs of a small table above the table: a row of keys over a row of values. */
export function pairsAcross(keys: readonly string[], values: readonly string[]): StatedPair[] {
  const known = keys.filter((key) => factOfKey(key) !== null).length;
  if (keys.length < 2 || known < 2 || values.some((value) => factOfKey(value) !== null)) return [];
  return keys.flatMap((key, at) => (key === '' || !values[at] ? [] : [{ key, value: values[at] }]));
}

/** Station facts that pairs state; the first word on each counts. What cannot be read, or has no unit, is left out. */
export function factsIn(pairs: readonly StatedPair[]): StatedFacts {
  const first = (kind: FactKind) => pairs.find(({ key, value }) => factOfKey(key) === kind && !NOTHING.test(value));
  const facts: StatedFacts = {};
  const bare = first('station')?.value;
  const code = first('code')?.value ?? (bare !== undefined && isNumber(bare) ? bare : undefined);
  const both = bare === undefined ? null : /^(\d{4,})\s*[-–:,]?\s+(\p{L}.*)$/u.exec(bare);
  if (code !== undefined && !/\s{2}/.test(code) && code.length <= 40) facts.code = code;
  else if (both) facts.code = both[1];
  const name = first('name')?.value ?? both?.[2] ?? (bare !== undefined && !isNumber(bare) ? bare : undefined);
  if (name !== undefined) facts.name = name.slice(0, 200);
  const river = first('river')?.value;
  if (river !== undefined) facts.river = river.slice(0, 200);
  const latitude = degrees(first('latitude')?.value, 90);
  const longitude = degrees(first('longitude')?.value, 180);
  if (latitude !== null && longitude !== null) Object.assign(facts, { latitude, longitude });
  const area = first('area');
  const areaKm2 = area ? areaOf(area) : null;
  if (areaKm2 !== null) facts.areaKm2 = areaKm2;
  return facts;
}

const isNumber = (text: string): boolean => /^[\p{L}\p{N}._-]*\d[\p{L}\p{N}._-]*$/u.test(text);

/** Lines that name stations by office, number and name, as tab-delimited agency files have them. */
export function stationsListed(remarks: readonly string[]): StatedFacts[] {
  return remarks.flatMap((text) => {
    const found = /^\p{Lu}{2,6}\s+(\d{8,15})\s+(\S.*)$/u.exec(withoutSign(text).trim());
    return found ? [{ code: found[1], name: found[2].trim() }] : [];
  });
}

/** The facts of the stations that a file was found to name.
 *  @param codes  the file's stations, as they are going to be stored */
export function factsOf(stated: readonly StatedFacts[] | undefined, codes: readonly string[]): FoundFacts[] {
  return (stated ?? []).flatMap(({ code, ...facts }) => {
    if (Object.keys(facts).length === 0) return [];
    if (code !== undefined && codes.includes(code)) return [{ code, ...facts }];
    // One block above one station is that station's, whatever number it is stored under.
    return codes.length === 1 && stated?.length === 1 ? [{ code: codes[0], ...facts }] : [];
  });
}

/** Degrees as decimals, or as degrees, minutes and seconds; null when they are neither, or out of range.
 *  A letter for the west counts; "O", east in one language and west in others, says nothing. */
function degrees(text: string | undefined, most: number): number | null {
  if (text === undefined) return null;
  const south = /[SsWw]\s*$|^\s*[SsWw]\b/.test(text);
  if (/\bO\b/.test(text)) return null;
  const parts = text
    .replace(/[^\d.,+\-°'’′"″\s]/g, ' ')
    .replace(/(\d),(\d)/g, '$1.$2')
    .split(/[°'’′"″\s]+/)
    .filter((part) => part !== '');
  if (parts.length < 1 || parts.length > 3 || !parts.every((part) => /^[+-]?\d+(?:\.\d+)?$/.test(part))) return null;
  const [whole, minutes = 0, seconds = 0] = parts.map(Number);
  if (minutes < 0 || minutes >= 60 || seconds < 0 || seconds >= 60) return null;
  const size = Math.abs(whole) + minutes / 60 + seconds / 3600;
  const value = south || parts[0].startsWith('-') ? -size : size;
  return size <= most ? Number(value.toFixed(6)) : null;
}

function areaOf({ key, value }: StatedPair): number | null {
  const factor = areaFactorOf(value) ?? areaFactorOf(key);
  const number = /^[+]?\d[\d.,\s'’]*/.exec(value)?.[0].trim();
  if (factor === null || number === undefined) return null;
  // A sign before three last digits is decimal to some and between thousands to others: such an area is left to be said.
  if (/^[1-9]\d{0,2}[.,]\d{3}$/.test(number)) return null;
  const plain = number
    .replace(/[\s'’]/g, '')
    .replace(/[.,](?=.*[.,])/g, '')
    .replace(',', '.');
  const area = Number(plain) * factor;
  return Number.isFinite(area) && area > 0 ? area : null;
}
