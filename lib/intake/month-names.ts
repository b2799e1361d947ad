/** Names of the months in English, German, French, Spanish, Portuguese, Italian, Dutch and Swedish, marks over letters left
 *  out. Any beginning of at least three letters stands for a name where it is no other month's too. */
const NAMES = [
  'january januar janner janvier enero janeiro gennaio januari',
  'february februar feber fevrier febrero fevereiro febbraio februari',
  'march marz mars marzo marco maart mrt maerz',
  'april avril abril aprile',
  'may mai mayo maio maggio mei maj',
  'june juni juin junio junho giugno',
  'july juli juillet julio julho luglio',
  'august aout agosto augustus augusti',
  'september septembre septiembre setembro settembre setiembre',
  'october oktober octobre octubre outubro ottobre',
  'november novembre noviembre novembro',
  'december dezember decembre diciembre dezembro dicembre',
];

const byName = new Map<string, number>();
for (const [at, names] of NAMES.entries()) {
  for (const name of names.split(' ')) {
    for (let length = 3; length <= name.length; length++) {
      const start = name.slice(0, length);
      const other = byName.get(start);
      byName.set(start, other === undefined || other === at + 1 ? at + 1 : 0);
    }
  }
}

/** Texts met before, for a file writes a dozen of them over and over. */
const met = new Map<string, number>();

/** Month, 1 to 12, that a name or its abbreviation means; 0 for any other text.
 *  Example: "janv." → 1 */
export function monthOfName(text: string): number {
  const known = met.get(text);
  if (known !== undefined) return known;
  const plain = text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase().replace(/\.$/, '');
  const month = byName.get(plain) ?? 0;
  if (met.size < 1000) met.set(text, month);
  return month;
}

/** A date whose month is a name. */
export interface NamedDate {
  day: number;
  month: number;
  year: number;
  /** the year is written with two digits */
  short: boolean;
}

const TIME = '(?:[T, ]+\\d{1,2}[:.]\\d{2}.{0,24})?';
const DAY_FIRST = new RegExp(
  `^(\\d{1,2})(?:st|nd|rd|th|er|\\.)?[-\\s/]*(?:de )?(\\p{L}{3,12})\\.?[-\\s/,]*(?:del? )?(\\d{4}|\\d{2})${TIME}$`,
  'u',
);
const MONTH_FIRST = new RegExp(
  `^(\\p{L}{3,12})\\.?[-\\s/]+(\\d{1,2})(?:st|nd|rd|th)?[-\\s/,]+(\\d{4}|\\d{2})${TIME}$`,
  'u',
);
const YEAR_FIRST = new RegExp(`^(\\d{4})[-\\s/.,]*(\\p{L}{3,12})\\.?[-\\s/.]*(\\d{1,2})${TIME}$`, 'u');

/** Reads a date such as `03-Jan-2001`, `3 janv. 2001`, `January 3, 2001`, `2001-Jan-03`; null for any other text. */
export function namedDate(text: string): NamedDate | null {
  if (text.length > 48) return null;
  const parts = (day: string, month: string, year: string): NamedDate | null => {
    const found = monthOfName(month);
    return found === 0 ? null : { day: Number(day), month: found, year: Number(year), short: year.length === 2 };
  };
  const dayFirst = DAY_FIRST.exec(text);
  if (dayFirst) return parts(dayFirst[1], dayFirst[2], dayFirst[3]);
  const monthFirst = MONTH_FIRST.exec(text);
  if (monthFirst) return parts(monthFirst[2], monthFirst[1], monthFirst[3]);
  const yearFirst = YEAR_FIRST.exec(text);
  return yearFirst ? parts(yearFirst[3], yearFirst[2], yearFirst[1]) : null;
}
