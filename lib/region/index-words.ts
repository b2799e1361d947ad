import type { AnnualIndexName } from '../basis.ts';

/** An annual index in words, for sentences, headings and files. */
export interface IndexWords {
  /** the figures of several years. Example: "minima" */
  many: string;
  /** the mean of them. Example: "mean minimum" */
  mean: string;
  /** what a falling and a rising trend are called. Example: "earlier" for dates */
  falling: string;
  rising: string;
  /** how a station without any is told; empty where that cannot be */
  none: string;
}

export const INDEX_WORDS: Readonly<Record<AnnualIndexName, IndexWords>> = {
  minimum: { many: 'minima', mean: 'mean minimum', falling: 'falling', rising: 'rising', none: '' },
  q95: { many: 'annual Q95', mean: 'mean annual Q95', falling: 'falling', rising: 'rising', none: '' },
  'mean-flow': { many: 'annual mean flows', mean: 'mean flow', falling: 'falling', rising: 'rising', none: '' },
  'zero-flow-days': {
    many: 'counts of zero-flow days',
    mean: 'mean number of zero-flow days',
    falling: 'drying for longer',
    rising: 'drying for shorter',
    none: 'no zero-flow day',
  },
  bfi: { many: 'baseflow indices', mean: 'mean baseflow index', falling: 'falling', rising: 'rising', none: '' },
  'minimum-date': { many: 'dates', mean: 'mean date', falling: 'earlier', rising: 'later', none: '' },
  deficit: {
    many: 'deficit volumes',
    mean: 'mean deficit volume',
    falling: 'larger deficits',
    rising: 'smaller deficits',
    none: 'no day below its Q90',
  },
};
