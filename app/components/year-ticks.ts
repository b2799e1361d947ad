/** Years to label on an axis of given width: every 1, 2, 5, 10, 20 or 50 years, whichever leaves room for a label.
 *  @returns multiples of the step inside [first, last] */
export function yearTicks(first: number, last: number, widthPx: number): number[] {
  const most = Math.max(2, Math.floor(widthPx / 56));
  const step = [1, 2, 5, 10, 20, 50, 100].find((candidate) => (last - first) / candidate <= most) ?? 200;
  const ticks: number[] = [];
  for (let year = Math.ceil(first / step) * step; year <= last; year += step) ticks.push(year);
  return ticks;
}
