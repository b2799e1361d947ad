/** Invented regions whose truth is known: noise that carries over from year to year and is shared by neighbours. */
import { type RandomStream, randomStream } from '../../lib/statistics/random.ts';

/** Years of a series before those that are kept: by then its beginning is forgotten. */
const RUN_IN = 60;

export interface Noise {
  stations: number;
  years: number;
  /** correlation of a year with the one before */
  lag1: number;
  /** correlation between any two stations in the same year */
  shared: number;
}

/** Two independent standard normal numbers. Source: Box & Muller 1958. */
function normals(random: RandomStream): [number, number] {
  const radius = Math.sqrt(-2 * Math.log(1 - random.uniform()));
  const angle = 2 * Math.PI * random.uniform();
  return [radius * Math.cos(angle), radius * Math.sin(angle)];
}

/** An endless row of standard normal numbers. */
export function normalRow(random: RandomStream): () => number {
  let held: number | null = null;
  return () => {
    if (held !== null) {
      const value = held;
      held = null;
      return value;
    }
    const [one, other] = normals(random);
    held = other;
    return one;
  };
}

/** First-order autoregressive series of mean 0 and variance 1, one a station, correlated with each other as asked. */
export function noise({ stations, years, lag1, shared }: Noise, ...labels: (string | number)[]): Float64Array[] {
  const normal = normalRow(randomStream('validate', ...labels));
  const rows = Array.from({ length: stations }, () => new Float64Array(years));
  const state = new Float64Array(stations);
  const fresh = Math.sqrt(1 - lag1 * lag1);
  const own = Math.sqrt(1 - shared);
  const common = Math.sqrt(shared);
  for (let year = -RUN_IN; year < years; year++) {
    const weather = shared > 0 ? normal() : 0;
    for (let i = 0; i < stations; i++) {
      const innovation = common * weather + own * normal();
      state[i] = year === -RUN_IN ? innovation : lag1 * state[i] + fresh * innovation;
      if (year >= 0) rows[i][year] = state[i];
    }
  }
  return rows;
}

/** Fractional Gaussian noise of Hurst coefficient H, by the exact recursion over its autocovariances.
 *  Source: Durbin–Levinson recursion as in Hosking 1984, Water Resour. Res. 20:1898–1908. */
export function longMemory(years: number, hurst: number, ...labels: (string | number)[]): Float64Array {
  const normal = normalRow(randomStream('validate', 'long memory', ...labels));
  const gamma = (k: number) =>
    0.5 * (Math.abs(k + 1) ** (2 * hurst) - 2 * Math.abs(k) ** (2 * hurst) + Math.abs(k - 1) ** (2 * hurst));
  const values = new Float64Array(years);
  let weights: number[] = [];
  let variance = 1;
  values[0] = normal();
  for (let n = 1; n < years; n++) {
    let numerator = gamma(n);
    for (let j = 0; j < weights.length; j++) numerator -= weights[j] * gamma(n - 1 - j);
    const reflection = numerator / variance;
    weights = [...weights.map((weight, j) => weight - reflection * weights[weights.length - 1 - j]), reflection];
    variance *= 1 - reflection * reflection;
    let mean = 0;
    for (let j = 0; j < weights.length; j++) mean += weights[j] * values[n - 1 - j];
    values[n] = mean + Math.sqrt(variance) * normal();
  }
  return values;
}

export const yearsFrom = (first: number, count: number): number[] => Array.from({ length: count }, (_, i) => first + i);
