import { INFLUENCES, type Influence } from '../../region/ranking-types.ts';
import type { RegistryStation } from '../types.ts';
import { areaFactorOf, type RegistryColumns } from './registry-columns.ts';

/** What is wrong with a row, the value at fault, and what to do about it. */
export interface RowProblem {
  value: string;
  reason: string;
  remedy: string;
}

/** How influence is put in other registries. */
const INFLUENCE_WORDS: [RegExp, Influence][] = [
  [/^(natural|near natural|reference|unregulated|undisturbed|none)$/, 'natural'],
  [/^(regulated|reservoir|dam|regulation)$/, 'regulated'],
  [/^(abstracted|abstraction|diverted|diversion|withdrawal)$/, 'abstracted'],
  [/^(augmented|augmentation|discharge|effluent)$/, 'augmented'],
  [/^(spring|springs|spring fed|karst)$/, 'spring-fed'],
  [/^(urban|urbanised|urbanized)$/, 'urban'],
  [/^(unknown|)$/, 'unknown'],
];

/** The influence that a text names; null when it names none. */
export function influenceOf(text: string): Influence | null {
  const plain = text.trim().toLowerCase();
  const exact = INFLUENCES.find((influence) => influence === plain);
  const words = plain.replace(/[-_\s]+/g, ' ');
  return exact ?? INFLUENCE_WORDS.find(([pattern]) => pattern.test(words))?.[1] ?? null;
}

/** Reads one row. Empty fields are facts that nobody knows: null.
 *  @param areaFactor  km² in one unit of the area column; null when the row's unit column says it */
export function readRegistryRow(
  fields: readonly string[],
  columns: RegistryColumns,
  format: { areaFactor: number | null; decimalComma: boolean },
): RegistryStation | RowProblem {
  const text = (column: number) => (column < 0 ? '' : (fields[column] ?? '').trim());
  const code = text(columns.code);
  if (code === '') return { value: '', reason: 'the row has no station code', remedy: 'Give every station a code' };
  const number = (column: number) => parseNumber(text(column), format.decimalComma);
  const latitude = number(columns.latitude);
  if (latitude !== null && !(Math.abs(latitude) <= 90)) return outside('latitude', text(columns.latitude), 90);
  const longitude = number(columns.longitude);
  if (longitude !== null && !(Math.abs(longitude) <= 180)) return outside('longitude', text(columns.longitude), 180);
  if ((latitude === null) !== (longitude === null)) {
    const [has, lacks] = latitude === null ? ['longitude', 'latitude'] : ['latitude', 'longitude'];
    return { value: code, reason: `the row has a ${has} but no ${lacks}`, remedy: 'Give both, or leave both empty' };
  }
  const area = number(columns.areaKm2);
  const areaText = text(columns.areaKm2);
  if (area !== null && !(area > 0)) {
    return {
      value: areaText,
      reason: Number.isNaN(area) ? 'the drainage area is not a number' : 'a drainage area must be more than 0',
      remedy: 'Correct it, or leave it empty where there is none or nobody knows',
    };
  }
  const factor = format.areaFactor ?? areaFactorOf(text(columns.areaUnit));
  if (area !== null && factor === null) {
    const value = text(columns.areaUnit);
    return { value, reason: 'the unit of the area is not known', remedy: 'Write km2, mi2, ha, acres or m2' };
  }
  const influence = influenceOf(text(columns.influence));
  if (influence === null) {
    const remedy = `Write one of ${INFLUENCES.join(', ')}`;
    return { value: text(columns.influence), reason: 'the influence is none that is known', remedy };
  }
  return {
    ...{ code, name: text(columns.name) || code, river: text(columns.river), latitude, longitude, influence },
    areaKm2: area === null ? null : exactly(area * (factor ?? 1)),
  };
}

/** Takes the binary tail off a converted area: 15 significant digits. */
function exactly(areaKm2: number): number {
  return Number(areaKm2.toPrecision(15));
}

/** Null for an empty field, NaN for text that is no number. */
function parseNumber(text: string, decimalComma: boolean): number | null {
  if (text === '' || /^(na|n\/a|nan|null|none|-)$/i.test(text)) return null;
  const pointed = decimalComma ? text.replace(',', '.') : text;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(pointed) ? Number(pointed) : Number.NaN;
}

function outside(what: 'latitude' | 'longitude', value: string, most: number): RowProblem {
  return {
    value,
    reason: `the ${what} is not a number from −${most} to ${most}`,
    remedy: 'Give decimal degrees (WGS 84), south and west negative',
  };
}
