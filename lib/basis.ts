/** The basis: the terms of comparison, as one validated object.
 *
 *  Every page, file and API call takes a basis and carries it on. In a URL only the keys that differ from the region's
 *  own basis are written; in JSON any subset of keys may be given. Open to every floor, and free of I/O. */
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import * as z from 'zod';

/** Else zod tries to make code at run time, which the pages' Content-Security-Policy forbids and reports. */
z.config({ jitless: true });

export const EXCLUDABLE_FLAGS = ['estimated', 'provisional', 'ice', 'below-detection', 'suspect'] as const;
export type ExcludableFlag = (typeof EXCLUDABLE_FLAGS)[number];

/** What is tested for a trend: one figure a low-flow year. */
export const INDICES = ['minimum', 'q95', 'mean-flow', 'zero-flow-days', 'bfi', 'minimum-date', 'deficit'] as const;
export type AnnualIndexName = (typeof INDICES)[number];

export const SERIAL_CORRECTIONS = [
  'ar1-regional',
  'ar1',
  'none',
  'all-lags',
  'pre-whitened',
  'block-bootstrap',
] as const;

const month = z.int().min(1).max(12);
const year = z.int().min(1000).max(9999);

/** Longer than any river has been gauged; a start–end chart grows with the square of it. */
const MOST_PERIOD_YEARS = 500;

const ascendingYears = z
  .tuple([year, year])
  .refine(([first, last]) => first <= last, { error: 'the first year must not come after the last' })
  .refine(([first, last]) => last - first < MOST_PERIOD_YEARS, { error: 'longer than any record' });

/** One schema for every edge: URL, JSON, forms and API. Keys as in the batch command's `--basis`. */
export const basisSchema = z
  .strictObject({
    /** 'common', null (each station's own years) or [first, last] low-flow years */
    period: z.union([z.literal('common'), z.null(), ascendingYears]).default('common'),
    /** first month of the low-flow year, or 'auto': the region's wettest month */
    yearStart: z.union([z.literal('auto'), month]).default('auto'),
    /** null for the whole year, or [firstMonth, lastMonth] inside one low-flow year */
    season: z.union([z.null(), z.tuple([month, month])]).default(null),
    /** length n of the n-day mean */
    days: z.int().min(1).max(365).default(7),
    /** missing days allowed in a usable year, scaled to the season */
    maxMissingDays: z.int().min(0).max(365).default(18),
    /** flags whose days are treated as missing */
    exclude: z.array(z.enum(EXCLUDABLE_FLAGS)).default(['provisional']),
    minYears: z.int().min(3).max(1000).default(20),
    /** share of the period, 0 to 1 */
    minCoverage: z.number().min(0).max(1).default(0.8),
    normalise: z.enum(['area', 'mean', 'median', 'none']).default('area'),
    rankBy: z.enum(['percent-per-decade', 'specific-change', 'kendall-tau']).default('percent-per-decade'),
    trendTest: z.enum(['mann-kendall']).default('mann-kendall'),
    serialCorrection: z.enum(SERIAL_CORRECTIONS).default('ar1-regional'),
    alpha: z.number().min(0.001).max(0.5).default(0.1),
    /** display only; stored and exported values are metric */
    units: z.enum(['metric', 'us']).default('metric'),
    /** the annual figure that is tested and ranked; days and season shape the minimum and its date */
    index: z.enum(INDICES).default('minimum'),
  })
  .superRefine((basis, context) => {
    const problem = seasonProblem(basis.season, basis.yearStart);
    if (problem) context.addIssue({ code: 'custom', path: ['season'], message: problem });
  });

export type Basis = z.output<typeof basisSchema>;
export type BasisKey = keyof Basis;

export const DEFAULT_BASIS: Basis = Object.freeze(basisSchema.parse({})) as Basis;
Object.freeze(DEFAULT_BASIS.exclude);
export const BASIS_KEYS = Object.keys(DEFAULT_BASIS) as BasisKey[];

/** The basis with `common` and `auto` replaced by what they came to for a region's records. */
export interface ResolvedBasis extends Omit<Basis, 'period' | 'yearStart'> {
  /** null: each station's own years */
  period: [number, number] | null;
  yearStart: number;
  /** what was asked for, so that sentences can say how the years were chosen */
  asked: Pick<Basis, 'period' | 'yearStart'>;
}

/** Thrown for a basis that cannot be used; the message names each key, its value and what would do. */
export class BasisError extends Error {
  override name = 'BasisError';
}

/** Months a..b must lie inside the low-flow year that starts in `yearStart`.
 *  @returns null when they do, else a sentence that says which start month would do. */
export function seasonProblem(season: Basis['season'], yearStart: Basis['yearStart']): string | null {
  if (season === null || yearStart === 'auto') return null;
  const place = (monthOfYear: number) => (monthOfYear - yearStart + 12) % 12;
  if (place(season[0]) <= place(season[1])) return null;
  return `${MONTHS[season[0] - 1]}–${MONTHS[season[1] - 1]} runs over the end of a low-flow year that starts in ${
    MONTHS[yearStart - 1]
  }; a year that starts in ${MONTHS[season[0] - 1]} would hold it`;
}

/** Parses any subset of keys laid over a base.
 *  @throws BasisError that names every unknown key and bad value */
export function parseBasis(input: unknown, base: Basis = DEFAULT_BASIS): Basis {
  if (typeof input !== 'object' || input === null || Array.isArray(input)) {
    throw new BasisError('A basis must be a JSON object, for example {"days": 30}.');
  }
  // a key that is there but undefined was not given: the base's value stands, not the general default
  const given = Object.fromEntries(Object.entries(input).filter(([, value]) => value !== undefined));
  const laidOver = { ...base, ...given };
  const result = basisSchema.safeParse(laidOver);
  if (!result.success) {
    const problems = result.error.issues.map((issue) => describeIssue(issue, laidOver));
    throw new BasisError([...new Set(problems)].join(' '));
  }
  return { ...result.data, exclude: sortFlags(result.data.exclude) };
}

function describeIssue(issue: z.core.$ZodIssue, input: object): string {
  if (issue.code === 'unrecognized_keys') {
    return `Unknown basis key ${issue.keys.map((key) => `"${key}"`).join(', ')}; the keys are ${BASIS_KEYS.join(', ')}.`;
  }
  const key = String(issue.path[0] ?? '');
  const value = JSON.stringify((input as Record<string, unknown>)[key]);
  return `Basis key "${key}" cannot be ${value}: ${ALLOWED[key as BasisKey] ?? issue.message}${
    issue.code === 'custom' ? ` (${issue.message})` : ''
  }.`;
}

/** What each key takes, in words for messages. */
const ALLOWED: Record<BasisKey, string> = {
  period: `"common", null, or [first, last] low-flow years 1000–9999 in rising order, at most ${MOST_PERIOD_YEARS} years`,
  yearStart: '"auto" or a month 1–12',
  season: 'null or [firstMonth, lastMonth], each 1–12, inside one low-flow year',
  days: 'a whole number 1–365',
  maxMissingDays: 'a whole number 0–365',
  exclude: `a list of ${EXCLUDABLE_FLAGS.join(', ')}`,
  minYears: 'a whole number 3–1000',
  minCoverage: 'a number 0–1',
  normalise: 'area, mean, median or none',
  rankBy: 'percent-per-decade, specific-change or kendall-tau',
  trendTest: 'mann-kendall',
  serialCorrection: 'ar1-regional, ar1, none, all-lags, pre-whitened or block-bootstrap',
  alpha: 'a number 0.001–0.5',
  units: 'metric or us',
  index: 'minimum, q95, mean-flow, zero-flow-days, bfi, minimum-date or deficit',
};

function sortFlags(flags: readonly ExcludableFlag[]): ExcludableFlag[] {
  return EXCLUDABLE_FLAGS.filter((flag) => flags.includes(flag));
}

/** The value of one key as URL text. */
function keyToText(basis: Basis, key: BasisKey): string {
  switch (key) {
    case 'period':
      if (basis.period === null) return 'own';
      return basis.period === 'common' ? 'common' : basis.period.join('-');
    case 'season':
      return basis.season === null ? 'none' : basis.season.join('-');
    case 'exclude':
      return basis.exclude.length ? basis.exclude.join(',') : 'none';
    default:
      return String(basis[key]);
  }
}

/** Every key as it stands in an address. */
export function basisTexts(basis: Basis): Record<BasisKey, string> {
  return Object.fromEntries(BASIS_KEYS.map((key) => [key, keyToText(basis, key)])) as Record<BasisKey, string>;
}

/** Only the keys that differ from `base`, in the schema's order: what a link carries.
 *  Example: {days: 30, period: [1985, 2024]} → "period=1985-2024&days=30" */
export function basisToQuery(basis: Basis, base: Basis = DEFAULT_BASIS): URLSearchParams {
  const query = new URLSearchParams();
  for (const key of BASIS_KEYS) {
    const text = keyToText(basis, key);
    if (text !== keyToText(base, key)) query.set(key, text);
  }
  return query;
}

const numberOrText = (text: string): unknown =>
  text.trim() !== '' && Number.isFinite(Number(text)) ? Number(text) : text;
const pair = (text: string): unknown => {
  const match = /^(\d+)-(\d+)$/.exec(text);
  return match ? [Number(match[1]), Number(match[2])] : text;
};

/** Reads a basis from query parameters laid over `base`; parameters that are no basis keys are left to others.
 *  @throws BasisError naming the key and the value that cannot be used */
export function basisFromQuery(
  query: URLSearchParams | Record<string, string | string[] | undefined>,
  base: Basis = DEFAULT_BASIS,
): Basis {
  const get = (key: string): string | undefined => {
    if (query instanceof URLSearchParams) return query.get(key) ?? undefined;
    const value = query[key];
    return Array.isArray(value) ? value[0] : value;
  };
  const input: Record<string, unknown> = {};
  for (const key of BASIS_KEYS) {
    const text = get(key);
    if (text === undefined) continue;
    if (key === 'period') input[key] = text === 'own' ? null : pair(text);
    else if (key === 'season') input[key] = text === 'none' ? null : pair(text);
    else if (key === 'exclude') input[key] = text === 'none' || text === '' ? [] : text.split(',');
    else input[key] = numberOrText(text);
  }
  return parseBasis(input, base);
}

/** The keys of a basis that an analysis reads, as canonical text: part of a result's key. */
export function basisText(basis: Basis | ResolvedBasis, keys: readonly BasisKey[] = BASIS_KEYS): string {
  return JSON.stringify(keys.map((key) => [key, basis[key]]));
}

/** SHA-256 of the whole basis, hexadecimal: equal exactly when every key is equal. */
export function basisHash(basis: Basis): string {
  return bytesToHex(sha256(utf8ToBytes(basisText(basis))));
}

export const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
] as const;

/** A run of the basis sentence; `term` names the keys that this run speaks of and that a person may edit there. */
export interface SentencePart {
  text: string;
  term?: 'days' | 'yearStart' | 'period' | 'completeness' | 'rankBy' | 'test' | 'exclude' | 'normalise';
}

/** What a percentage is of, and the unit of a change per unit of area. */
const RANK_WORDS: Record<Exclude<AnnualIndexName, 'zero-flow-days' | 'minimum-date'>, [string, string]> = {
  minimum: ['mean minimum', 'change in L/s/km²'],
  q95: ['mean annual Q95', 'change in L/s/km²'],
  'mean-flow': ['mean flow', 'change in L/s/km²'],
  bfi: ['mean baseflow index', 'change'],
  deficit: ['mean deficit volume', 'change in mm'],
};

/** What stations are ranked by, in words. Example: "% of the mean minimum per decade" */
export function rankWords({ rankBy, index }: Pick<Basis, 'rankBy' | 'index'>): string {
  if (rankBy === 'kendall-tau') return 'Kendall’s tau';
  // percentages of dates, or of a mean of few dry days, say nothing
  if (index === 'zero-flow-days' || index === 'minimum-date') return 'days per decade';
  const [mean, change] = RANK_WORDS[index];
  return rankBy === 'percent-per-decade' ? `% of the ${mean} per decade` : `${change} per decade`;
}

/** What each serial correction does, in words that follow "Mann–Kendall". */
export const SERIAL_WORDS: Record<Basis['serialCorrection'], string> = {
  'ar1-regional': 'with regional serial correction',
  ar1: 'with each station’s serial correction',
  none: 'without serial correction',
  'all-lags': 'corrected for all significant lags',
  'pre-whitened': 'on trend-free pre-whitened series',
  'block-bootstrap': 'by moving-block bootstrap',
};

/** What is compared, in words. */
export function indexWords({ index, days }: Pick<Basis, 'index' | 'days'>): string {
  switch (index) {
    case 'minimum':
      return `${days}-day minima`;
    case 'minimum-date':
      return `dates of the ${days}-day minimum`;
    case 'q95':
      return 'annual Q95';
    case 'mean-flow':
      return 'annual mean flow';
    case 'zero-flow-days':
      return 'zero-flow days';
    case 'bfi':
      return 'the baseflow index';
    case 'deficit':
      return 'deficit volumes below Q90';
  }
}

const NORMALISE_WORDS: Record<Basis['normalise'], string> = {
  area: 'per unit of drainage area',
  mean: 'as a ratio to each station’s mean flow',
  median: 'as a ratio to each station’s median flow',
  none: 'as measured',
};

/** 0.8 → "80", 0.125 → "12.5": a share as percent without binary tails. */
const percent = (share: number): string => String(Number((share * 100).toFixed(4)));

/** Months of a low-flow year in words: 4 → "April–March". */
export function yearWords(yearStart: number): string {
  return yearStart === 1 ? 'calendar' : `${MONTHS[yearStart - 1]}–${MONTHS[(yearStart + 10) % 12]}`;
}

/** Whether the words for an index name the days of the mean; where they do not, usable years still depend on these. */
const hasDays = (index: AnnualIndexName): boolean => index === 'minimum' || index === 'minimum-date';

/** The basis in plain words, in runs, each with the term it speaks of. */
export function basisSentenceParts(basis: ResolvedBasis): SentencePart[] {
  const whatOf = basis.season
    ? `${MONTHS[basis.season[0] - 1]}–${MONTHS[basis.season[1] - 1]} in ${yearWords(basis.yearStart)} years`
    : `${yearWords(basis.yearStart)} years`;
  const from = basis.asked.yearStart === 'auto' ? ' (from the wettest month)' : '';
  const period =
    basis.period === null
      ? basis.asked.period === 'common'
        ? 'no common period'
        : 'each station’s own years'
      : `${basis.period[0]}–${basis.period[1]}${basis.asked.period === 'common' ? ' (the common period)' : ''}`;
  return [
    { text: 'Comparing ' },
    { text: indexWords(basis), term: 'days' },
    { text: ' of ' },
    { text: `${whatOf}${from}`, term: 'yearStart' },
    { text: ', ' },
    { text: period, term: 'period' },
    { text: ', at stations with ' },
    {
      text: `at least ${basis.minYears} usable years (at most ${basis.maxMissingDays} days missing${
        hasDays(basis.index) ? '' : `, judged by ${basis.days}-day means`
      }) and ${percent(basis.minCoverage)} % of ${basis.period === null ? 'their span' : 'the period'}`,
      term: 'completeness',
    },
    { text: ', ranked by ' },
    { text: rankWords(basis), term: 'rankBy' },
    { text: ', tested by ' },
    {
      text: `Mann–Kendall ${SERIAL_WORDS[basis.serialCorrection]}, ${percent(basis.alpha)} % false discoveries`,
      term: 'test',
    },
    { text: '; ' },
    {
      text: basis.exclude.length
        ? `${listWords(basis.exclude)} values count as missing`
        : 'no flagged values are left out',
      term: 'exclude',
    },
    { text: ', ' },
    { text: `duration curves ${NORMALISE_WORDS[basis.normalise]}`, term: 'normalise' },
    { text: '.' },
  ];
}

function listWords(words: readonly string[]): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`;
}

/** The basis sentence as one string, for exports. */
export function basisSentence(basis: ResolvedBasis): string {
  return basisSentenceParts(basis)
    .map((part) => part.text)
    .join('');
}
