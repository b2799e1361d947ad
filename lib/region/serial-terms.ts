import type { Basis } from '../basis.ts';
import { allLagsVarianceFactor } from '../statistics/all-lags.ts';
import { blockBootstrapFactor } from '../statistics/block-bootstrap.ts';
import type { DatedValues } from '../statistics/detrend.ts';
import { preWhitened, significantLag1 } from '../statistics/pre-whitening.ts';
import { randomStream } from '../statistics/random.ts';
import { ar1VarianceFactor, cutLag1, lag1OfRanks, shrinkLag1 } from '../statistics/serial-correlation.ts';

/** From this many series on, their lag-1 correlations are drawn towards their mean. */
export const FEWEST_FOR_REGIONAL = 10;

/** A series about to be tested, its slope known. */
export interface SlopedSeries extends DatedValues {
  /** names the series' own random stream */
  label?: string;
}

/** What a serial correction makes of one series before it is tested. */
export interface SerialTerms {
  /** lag-1 correlation that the correction used; NaN when it used none */
  r1: number;
  /** what Var S is multiplied by */
  serialFactor: number;
  /** what the test is run on: the values themselves, save when they are pre-whitened */
  tested: ArrayLike<number>;
}

/** The terms of every series of a family under one serial correction.
 *  - `none`: factor 1.
 *  - `ar1`: lag-1 correlation of each series by itself, and the factor for it.
 *  - `ar1-regional`: with at least 10 series each correlation is drawn towards the family's mean; fewer: as `ar1`. A
 *    series whose correlation cannot be told takes the mean.
 *  - `all-lags`: factor from all significant lags; no single r1.
 *  - `pre-whitened`: the test is run on whitened values when r1 is significant; factor 1.
 *  - `block-bootstrap`: factor by resampling; no r1. Draws are named by `seed`, the series' label and its values, so that
 *    they do not depend on the rest of the family.
 *  Sources: at the functions of `lib/statistics`. */
export function serialTerms(
  family: readonly SlopedSeries[],
  serialCorrection: Basis['serialCorrection'],
  seed = '',
): SerialTerms[] {
  switch (serialCorrection) {
    case 'none':
      return family.map(({ values }) => ({ r1: Number.NaN, serialFactor: 1, tested: values }));
    case 'ar1':
    case 'ar1-regional':
      return lag1Terms(family, serialCorrection === 'ar1-regional' && family.length >= FEWEST_FOR_REGIONAL);
    case 'all-lags':
      return family.map((series) => ({
        r1: Number.NaN,
        serialFactor: allLagsVarianceFactor(series).factor,
        tested: series.values,
      }));
    case 'pre-whitened':
      return family.map((series) => {
        const r1 = significantLag1(series);
        return { r1, serialFactor: 1, tested: Number.isNaN(r1) ? series.values : preWhitened(series, r1).values };
      });
    case 'block-bootstrap':
      return family.map(({ values, label = '' }) => {
        const random = randomStream(seed, 'block-bootstrap', label, ...Array.from(values));
        return { r1: Number.NaN, serialFactor: blockBootstrapFactor(values, random), tested: values };
      });
  }
}

function lag1Terms(family: readonly SlopedSeries[], regional: boolean): SerialTerms[] {
  const own = Float64Array.from(family, lag1OfRanks);
  const lengths = family.map(({ values }) => values.length);
  const correlations = (regional ? shrinkLag1(own, lengths) : own).map(cutLag1);
  return family.map(({ values }, i) => {
    const r1 = correlations[i];
    return { r1, serialFactor: Number.isNaN(r1) ? 1 : ar1VarianceFactor(values.length, r1), tested: values };
  });
}
