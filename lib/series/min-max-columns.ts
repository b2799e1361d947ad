/** A daily series drawn small: for each of equally wide stretches of days the lowest and the highest value, so that no peak
 *  and no low is lost.
 *  @param values  NaN where missing
 *  @param count   of columns, a whole number above 0; a series of fewer days has a column a day
 *  @returns       NaN in both for a column without a value
 *  @throws RangeError when count is not such a number
 *  Example: ([1, 5, NaN, 2], 2) → low [1, 2], high [5, 2] */
export function minMaxColumns(values: Float64Array, count: number): { low: Float64Array; high: Float64Array } {
  if (!(Number.isInteger(count) && count > 0)) {
    throw new RangeError(`minMaxColumns: count must be a whole number above 0, got ${count}`);
  }
  const columns = Math.min(count, values.length);
  const low = new Float64Array(columns).fill(Number.NaN);
  const high = low.slice();
  for (let column = 0; column < columns; column += 1) {
    const end = Math.floor(((column + 1) * values.length) / columns);
    for (let day = Math.floor((column * values.length) / columns); day < end; day += 1) {
      const value = values[day];
      if (Number.isNaN(value)) continue;
      if (!(value >= low[column])) low[column] = value;
      if (!(value <= high[column])) high[column] = value;
    }
  }
  return { low, high };
}
