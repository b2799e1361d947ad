/** Where the words of a break stand, beside its line. */
export interface BreakLabel {
  x: number;
  textAnchor: 'start' | 'end';
  /** 0 at the top; further ones lie lower, so that words do not meet */
  row: number;
}

const GAP = 5;

/** Words to the right of their lines, or to the left where the figure ends; those that would meet the words before them go
 *  a row further down.
 *  @param lines  places of the lines, rising
 *  @param width  room that the words of one take */
export function placeLabels(lines: readonly number[], width: number, right: number): BreakLabel[] {
  const ends: number[] = [];
  return lines.map((line) => {
    const isLeft = line + GAP + width > right;
    const from = isLeft ? line - GAP - width : line + GAP;
    const free = ends.findIndex((end) => end <= from);
    const row = free < 0 ? ends.length : free;
    ends[row] = from + width + GAP;
    return { x: isLeft ? line - GAP : line + GAP, textAnchor: isLeft ? 'end' : 'start', row };
  });
}
