import type { AnnualIndexName } from '../basis.ts';

/** An annual index in words, for sentences, headings and files. */
export interface IndexWords {
  /** the figure of a year. Example: "a minimum" */
  one: string;
  /** the figures of several years. Example: "minima" */
  many: string;
  /** the mean of them. Example: "mean minimum" */
  mean: string;
  /** what a falling and a rising trend are called. Example: "earlier" for dates */
  falling: string;
  rising: string;
  /** the same in a narrow column */
  shortly: { falling: string; rising: string };
  /** heading over their figures. Example: "Annual minima" */
  heading: string;
  /** how a station without any is told; empty where that cannot be */
  none: string;
}

const FALLS = { falling: 'falling', rising: 'rising', shortly: { falling: 'falling', rising: 'rising' }, none: '' };

export const INDEX_WORDS: Readonly<Record<AnnualIndexName, IndexWords>> = {
  minimum: { ...FALLS, one: 'a minimum', many: 'minima', mean: 'mean minimum', heading: 'Annual minima' },
  q95: { ...FALLS, one: 'an annual Q95', many: 'annual Q95', mean: 'mean annual Q95', heading: 'Annual Q95' },
  'mean-flow': { ...FALLS, one: 'a mean flow', many: 'annual mean flows', mean: 'mean flow', heading: 'Mean flows' },
  'zero-flow-days': {
    one: 'a count of zero-flow days',
    many: 'counts of zero-flow days',
    mean: 'mean number of zero-flow days',
    falling: 'drying for longer',
    rising: 'drying for shorter',
    shortly: { falling: 'longer dry', rising: 'shorter dry' },
    heading: 'Zero-flow days',
    none: 'no zero-flow day',
  },
  bfi: {
    ...FALLS,
    one: 'a baseflow index',
    many: 'baseflow indices',
    mean: 'mean baseflow index',
    heading: 'Baseflow index',
  },
  'minimum-date': {
    one: 'a date',
    many: 'dates',
    mean: 'mean date',
    falling: 'earlier',
    rising: 'later',
    shortly: { falling: 'earlier', rising: 'later' },
    heading: 'Dates of lows',
    none: '',
  },
  deficit: {
    one: 'a deficit volume',
    many: 'deficit volumes',
    mean: 'mean deficit volume',
    falling: 'larger deficits',
    rising: 'smaller deficits',
    shortly: { falling: 'larger', rising: 'smaller' },
    heading: 'Deficit volumes',
    none: 'no day below its Q90',
  },
};
