import { randomStream } from './random.ts';

/** A smooth random field over the plane, about −1 to 1. */
export type NoiseField = (x: number, y: number) => number;

const SIZE = 256;

/** Fractal value noise: random values on a lattice, smoothly interpolated, summed over octaves of half the size.
 *  @param scale    size of the largest features, in the unit of x and y
 *  @param octaves  how many times smaller features are added, each half as strong */
export function fractalNoise(
  seed: number,
  purpose: string,
  { scale, octaves }: { scale: number; octaves: number },
): NoiseField {
  const random = randomStream(seed, 'noise', purpose);
  const lattice = Float64Array.from({ length: SIZE * SIZE }, () => random.between(-1, 1));
  const at = (i: number, j: number) => lattice[(i & (SIZE - 1)) * SIZE + (j & (SIZE - 1))];
  const ease = (t: number) => t * t * (3 - 2 * t);

  const octave = (x: number, y: number) => {
    const [i, j] = [Math.floor(x), Math.floor(y)];
    const [u, v] = [ease(x - i), ease(y - j)];
    const low = at(i, j) * (1 - u) + at(i + 1, j) * u;
    const high = at(i, j + 1) * (1 - u) + at(i + 1, j + 1) * u;
    return low * (1 - v) + high * v;
  };
  return (x, y) => {
    let sum = 0;
    let total = 0;
    for (let k = 0; k < octaves; k += 1) {
      const strength = 0.5 ** k;
      // Each octave is shifted, so that lattice points do not line up.
      sum += strength * octave((x * 2 ** k) / scale + 17.3 * k, (y * 2 ** k) / scale + 51.7 * k);
      total += strength;
    }
    return sum / total;
  };
}
