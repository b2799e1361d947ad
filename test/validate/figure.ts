import type { SimulatedFigure } from '../../lib/region/simulated-figures.ts';

/** One thing to be simulated: cheap to name, long to run. */
export interface Scenario {
  claim: string;
  of: string;
  setting: string;
  /** ends of what the figure is meant to be; null where there is none on that side */
  aim?: [number | null, number | null];
  /** cases in the full run */
  cases: number;
  /** the figure of each case: 0 or 1 for whether, or a share
   *  @param size  how many cases to run */
  run(size: number): ArrayLike<number>;
}

/** Mean of the cases with its standard error. */
export function figureOf({ claim, of, setting, aim, run, cases }: Scenario, size = cases): SimulatedFigure {
  const values = run(size);
  const n = values.length;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += values[i];
  const value = sum / n;
  let squares = 0;
  for (let i = 0; i < n; i++) squares += (values[i] - value) ** 2;
  const error = Math.sqrt(squares / (n - 1) / n);
  const round = (figure: number) => Number(figure.toPrecision(4));
  return { claim, of, setting, value: round(value), error: round(error), cases: n, aim: aim ?? null };
}

/** Whether a figure is what it is meant to be, to within two standard errors. */
export function isAsMeant({ value, error, aim }: SimulatedFigure): boolean {
  if (aim === null) return true;
  const [low, high] = aim;
  return (low === null || value + 2 * error >= low) && (high === null || value - 2 * error <= high);
}
