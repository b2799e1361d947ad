import type { Quantity } from '../../series/quantities.ts';

/** What a statistic says of a series: a mean of each day, something else of each day (largest, smallest), or nothing. */
export type Statistic = 'mean' | 'other' | 'unknown';

/** Words of observed properties. Discharge of sediment is none of water; a well's level none of a river. */
const NEVER =
  /sediment|veloc|temperature|conduct|salin|oxygen|turbid|nitrogen|phosph|ground ?water|well level|reservoir|concentrat|load\b/;
const WORDS: [Quantity, RegExp][] = [
  [
    'flow',
    /discharge|stream ?flow|river ?flow|water ?flow|\bflow(?: rate)?\b|abfluss|durchfluss|d[ée]bit|caudal|portata/,
  ],
  ['stage', /\bstage\b|water ?level|river ?level|ga(?:g|ug)e ?height|wasserstand|hauteur d.eau|nivel/],
  ['rainfall', /rain ?fall|precipitation|niederschlag|pluie|pr[ée]cipitation/],
  ['potential-evaporation', /(?:potential|reference|crop)[\w -]*evap|\bpet\b|\beto\b/],
];
/** Parameter numbers of a public service whose codes stand in documents without words. */
const NUMBERS: Record<string, Quantity> = { '00060': 'flow', '00065': 'stage', '00045': 'rainfall' };

/** The quantity that an observed property names; null for one that is not kept.
 *  @param words  its title or description
 *  @param code   its code, or the last part of its address */
export function quantityNamed(words: string, code: string): Quantity | null {
  const number = /(?:^|=)(\d{5})$/.exec(code)?.[1];
  if (number !== undefined) return NUMBERS[number] ?? null;
  return ofWords(words) ?? (NEVER.test(plain(words)) ? null : ofWords(code));
}

function ofWords(text: string): Quantity | null {
  const words = plain(text);
  if (NEVER.test(words)) return null;
  return WORDS.find(([, pattern]) => pattern.test(words))?.[0] ?? null;
}

/** Lower case, and "StreamDischarge", "river_flow" as words. */
function plain(text: string): string {
  return text
    .replace(/(?<=\p{Ll})(?=\p{Lu})/gu, ' ')
    .replace(/[_#/+]/g, ' ')
    .toLowerCase();
}

/** Whether the words or number of a statistic say a mean. */
export function statisticNamed(text: string): Statistic {
  const words = text.toLowerCase();
  if (/\bmean\b|average|00003|mittel|moyen|medio/.test(words)) return 'mean';
  return /max|min|median|sum|total|mode|deviation|skew|0000[124-9]|000[1-9]\d|tidal/.test(words) ? 'other' : 'unknown';
}
