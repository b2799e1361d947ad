/** A figure as rows hold it: NaN is null, and −0 is 0. */
export const orNull = (value: number): number | null => (Number.isNaN(value) ? null : value + 0);
