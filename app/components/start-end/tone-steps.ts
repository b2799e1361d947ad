/** Steps of colour on each side of nought: a figure's step is how many of these its size reaches. */
export type ToneSteps = readonly [number, number, number, number];

/** Of Z: one standard deviation, then two-sided p of 0.1, 0.05 and 0.01. */
export const Z_STEPS: ToneSteps = [1, 1.645, 1.96, 2.576];

/** Round steps, each about twice the one before, for figures of which the largest is `most` in size.
 *  Example: 37 → [2, 5, 10, 20]
 *  @param most  nought or not finite: steps of [1, 2, 5, 10] */
export function roundSteps(most: number): ToneSteps {
  if (!(most > 0) || !Number.isFinite(most)) return [1, 2, 5, 10];
  const power = Math.floor(Math.log10(most));
  const factors = [1, 2, 5] as const;
  const top = factors.findLastIndex((factor) => factor * 10 ** power <= most);
  const step = (below: number) => {
    const place = top + 3 * 4 - below;
    return Number((factors[place % 3] * 10 ** (power + Math.floor(place / 3) - 4)).toPrecision(6));
  };
  return [step(3), step(2), step(1), step(0)];
}

/** −4 to 4: how far a figure is from nought, with its sign; 0 below the first step. */
export function toneOf(value: number, steps: ToneSteps): number {
  const reached = steps.filter((step) => Math.abs(value) >= step).length;
  return reached === 0 ? 0 : Math.sign(value) * reached;
}
