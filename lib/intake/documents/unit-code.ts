import { type Quantity, UNITS_OF, type Unit } from '../../series/quantities.ts';
import { unitNamedIn } from '../units.ts';

/** UCUM codes and what documents write in their place. The foot of UCUM's `[cft_i]` is the international one. */
const CODES = new Map<string, Unit>(
  Object.entries({
    'm3/s': 'm3/s',
    'm3.s-1': 'm3/s',
    'L/s': 'L/s',
    'l/s': 'L/s',
    'dm3/s': 'L/s',
    '[cft_i]/s': 'ft3/s',
    '[ft_i]3/s': 'ft3/s',
    '[cft_i].s-1': 'ft3/s',
    'ML/d': 'ML/d',
    'Ml/d': 'ML/d',
    '10*3.m3/d': 'ML/d',
    '10*6.L/d': 'ML/d',
    '10*6.[gal_us]/d': 'Mgal/d',
    '[acr_us].[ft_us]/d': 'acre-ft/d',
    '43560.[cft_i]/d': 'acre-ft/d',
    'mm/d': 'mm/d',
    m: 'm',
    cm: 'cm',
    mm: 'mm',
    '[ft_i]': 'ft',
    '[ft_us]': 'ft',
    ft: 'ft',
    feet: 'ft',
    '[in_i]': 'in',
    '[in_us]': 'in',
    in: 'in',
    inches: 'in',
    metre: 'm',
    meter: 'm',
    millimetre: 'mm',
    millimeter: 'mm',
  }),
);

/** UCUM code of each unit, for writing. Source: Unified Code for Units of Measure, 2.1. */
export const UCUM: Record<Unit, string> = {
  'm3/s': 'm3/s',
  'L/s': 'L/s',
  'ft3/s': '[cft_i]/s',
  'ML/d': 'ML/d',
  'Mgal/d': '10*6.[gal_us]/d',
  'acre-ft/d': '43560.[cft_i]/d',
  'mm/d': 'mm/d',
  m: 'm',
  cm: 'cm',
  mm: 'mm',
  ft: '[ft_i]',
  in: '[in_i]',
};

/** The unit that a document names by a code, an address or a title; null for one that is not known. */
export function unitOfCode(text: string): Unit | null {
  const last = text.trim().replace(/^(?:urn:|https?:).*?[:/#](?=[^:/#]+(?:\/[a-z])?$)/i, '');
  const code = decoded(last);
  return CODES.get(code) ?? CODES.get(code.toLowerCase()) ?? unitNamedIn(code) ?? unitNamedIn(decoded(text));
}

/** A unit of a quantity: depths a day are depths where they are of rain. */
export function unitFor(quantity: Quantity, unit: Unit | null): Unit | null {
  if (unit === null) return null;
  if (UNITS_OF[quantity].includes(unit)) return unit;
  return unit === 'mm/d' && UNITS_OF[quantity].includes('mm') ? 'mm' : null;
}

function decoded(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch (cause) {
    if (!(cause instanceof URIError)) throw cause;
    return text;
  }
}
