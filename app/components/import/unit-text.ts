/** A unit of imports as it is printed: "m3/s" → "m³/s". */
export function unitText(unit: string): string {
  return unit.replace(/(m|ft)3/, '$1³');
}
