import {
  type Basis,
  BasisError,
  basisToQuery,
  indexWords,
  MONTHS,
  parseBasis,
  type ResolvedBasis,
  SERIAL_CORRECTIONS,
  SERIAL_WORDS,
  seasonProblem,
  yearWords,
} from '../basis.ts';
import type { Alternative } from './window-types.ts';

const LENGTHS = [1, 3, 7, 14, 30, 60, 90] as const;
/** One a quarter: where the start of the year matters, one of them shows it. */
const START_MONTHS = [1, 4, 7, 10] as const;
/** The two halves of the year that summer and winter lows fall into. */
const SEASONS: readonly [number, number][] = [
  [5, 10],
  [11, 4],
];
const LAST_YEARS = [60, 50, 40, 30, 20] as const;

/** One other choice of one term, before anything is computed. */
export interface AlternativeTerms extends Pick<Alternative, 'term' | 'label' | 'change' | 'current'> {
  /** the terms as they would be asked for; null with the reason where they contradict one another */
  basis: Basis | null;
  problem: string | null;
}

type Keys = Partial<Basis>;

/** The other choices that are tried for each term: n-day length and season where the index reads them, start month,
 *  period, serial correction. What the basis says is among them.
 *  @param basis     the terms at hand, as asked for
 *  @param resolved  what they came to for the region */
export function alternativeTerms(basis: Basis, resolved: ResolvedBasis): AlternativeTerms[] {
  const ofMinima = basis.index === 'minimum' || basis.index === 'minimum-date';
  const choose = (term: Alternative['term'], label: string, keys: Keys) => choice({ term, label, keys, basis });
  return [
    ...(ofMinima ? lengths(basis).map((days) => choose('days', indexWords({ ...basis, days }), { days })) : []),
    ...startMonths(basis, resolved).map(([label, yearStart]) => choose('yearStart', label, { yearStart })),
    ...(ofMinima ? seasons(basis, resolved).map(([label, keys]) => choose('season', label, keys)) : []),
    ...periods(basis, resolved).map(([label, period]) => choose('period', label, { period })),
    ...SERIAL_CORRECTIONS.map((serialCorrection) =>
      choose('serialCorrection', SERIAL_WORDS[serialCorrection], { serialCorrection }),
    ),
  ];
}

interface Choice extends Pick<Alternative, 'term' | 'label'> {
  keys: Keys;
  basis: Basis;
}

function choice({ term, label, keys, basis }: Choice): AlternativeTerms {
  try {
    const other = parseBasis(keys, basis);
    const change = Object.fromEntries(basisToQuery(other, basis));
    return { term, label, change, current: Object.keys(change).length === 0, basis: other, problem: null };
  } catch (error) {
    if (!(error instanceof BasisError)) throw error;
    return { term, label, change: {}, current: false, basis: null, problem: error.message };
  }
}

const lengths = ({ days }: Basis): number[] => [...new Set([...LENGTHS, days])].sort((a, b) => a - b);

function startMonths(basis: Basis, { yearStart }: ResolvedBasis): [string, Basis['yearStart']][] {
  const own: [string, Basis['yearStart']] = [
    `${yearWords(yearStart)} years${basis.yearStart === 'auto' ? ' (from the wettest month)' : ''}`,
    basis.yearStart,
  ];
  const others = START_MONTHS.filter((month) => month !== yearStart).map((month): [string, number] => [
    `${yearWords(month)} years`,
    month,
  ]);
  const automatic: [string, 'auto'][] = basis.yearStart === 'auto' ? [] : [['years from the wettest month', 'auto']];
  return [own, ...others, ...automatic];
}

/** A season that runs over the end of the low-flow year brings its own start month along. */
function seasons(basis: Basis, { yearStart }: ResolvedBasis): [string, Keys][] {
  const own = basis.season;
  const isOwn = ([from, to]: readonly [number, number]) => own !== null && own[0] === from && own[1] === to;
  const all = own === null || SEASONS.some(isOwn) ? SEASONS : [own, ...SEASONS];
  const named = all.map((season): [string, Keys] => {
    const words = `${MONTHS[season[0] - 1]}–${MONTHS[season[1] - 1]}`;
    const fits = isOwn(season) || seasonProblem(season, yearStart) === null;
    return fits
      ? [words, { season }]
      : [`${words}, in ${yearWords(season[0])} years`, { season, yearStart: season[0] }];
  });
  return [['all the year', { season: null }], ...named];
}

function periods(basis: Basis, { period }: ResolvedBasis): [string, Basis['period']][] {
  const list: [string, Basis['period']][] = [];
  const spanWords = (span: readonly [number, number]) => span.join('–');
  const common =
    basis.period === 'common' && period !== null ? `${spanWords(period)}, the common period` : 'the common period';
  list.push([common, 'common']);
  if (Array.isArray(basis.period)) list.push([spanWords(basis.period), basis.period]);
  for (const years of period === null ? [] : LAST_YEARS) {
    const [first, last] = period!;
    if (years < basis.minYears || last - years + 1 <= first) continue;
    list.push([`the last ${years} years, ${spanWords([last - years + 1, last])}`, [last - years + 1, last]]);
  }
  list.push(['each station’s own years', null]);
  return list;
}
