/** The values that exist, in their order: a copy without NaN.
 *  @throws RangeError naming `caller` when a value is infinite */
export function presentValues(x: ArrayLike<number>, caller: string): Float64Array {
  const present = new Float64Array(x.length);
  let count = 0;
  for (let i = 0; i < x.length; i++) {
    const value = x[i];
    if (Number.isNaN(value)) continue;
    if (!Number.isFinite(value))
      throw new RangeError(`${caller}: x[${i}] must be a finite number or NaN, got ${value}`);
    present[count++] = value;
  }
  return present.subarray(0, count);
}
