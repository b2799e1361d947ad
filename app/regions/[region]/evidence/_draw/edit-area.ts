import { type Corner, MOST_CORNERS } from '@/lib/region/in-polygon';

/** Where a new corner goes: between the two whose edge it lengthens least; at the end while there is no area yet. */
export function withCorner(area: readonly Corner[], corner: Corner): { area: Corner[]; at: number } {
  if (area.length >= MOST_CORNERS) return { area: [...area], at: area.length - 1 };
  let [at, least] = [area.length, Infinity];
  for (let i = 0; area.length >= 3 && i < area.length; i++) {
    const [from, to] = [area[i], area[(i + 1) % area.length]];
    const longer = distance(from, corner) + distance(corner, to) - distance(from, to);
    if (longer < least) [at, least] = [i + 1, longer];
  }
  return { area: [...area.slice(0, at), corner, ...area.slice(at)], at };
}

export const withoutCorner = (area: readonly Corner[], at: number): Corner[] => area.filter((_, i) => i !== at);

export const withCornerAt = (area: readonly Corner[], at: number, corner: Corner): Corner[] =>
  area.map((old, i) => (i === at ? corner : old));

const distance = ([x1, y1]: Corner, [x2, y2]: Corner): number => Math.hypot(x2 - x1, y2 - y1);
