/** 0.05 → "5", 0.999 → "99.9": an exceedance as percent without binary tails. */
export function exceedanceText(exceedance: number): string {
  return String(Number((exceedance * 100).toFixed(4)));
}
