/** Moves labels apart along one axis so that none covers another, each as near to its own place as it can be.
 *  Labels that collide form a group centred on the mean of their wanted places; groups merge while they touch.
 *  @param wanted  wanted centre of each label, any order
 *  @param height  of one label, with the space to the next
 *  @param bounds  [first, last] between which every label must lie; when they cannot all fit, they are spread evenly
 *  @returns       centres in the order of `wanted`
 *  Example: spreadLabels([10, 12], 10, [0, 100]) → [6, 16] */
export function spreadLabels(wanted: readonly number[], height: number, bounds: [number, number]): number[] {
  const [first, last] = bounds;
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a] - wanted[b] || a - b);
  const room = wanted.length > 1 ? Math.min(height, (last - first - height) / (wanted.length - 1)) : height;
  const step = Math.max(0, room);
  const groups: { members: number[]; start: number }[] = [];
  for (const index of order) {
    let group = placed([index], wanted, step, height, first, last);
    while (groups.length) {
      const before = groups[groups.length - 1];
      if (before.start + before.members.length * step <= group.start + 1e-9) break;
      groups.pop();
      group = placed([...before.members, ...group.members], wanted, step, height, first, last);
    }
    groups.push(group);
  }
  const centres = new Array<number>(wanted.length);
  for (const { members, start } of groups) {
    members.forEach((index, place) => {
      centres[index] = start + place * step;
    });
  }
  return centres;
}

/** A group of touching labels, centred on the mean of what its members want and pushed inside the bounds. */
function placed(
  members: number[],
  wanted: readonly number[],
  step: number,
  height: number,
  first: number,
  last: number,
): { members: number[]; start: number } {
  const extent = (members.length - 1) * step;
  const mean = members.reduce((sum, index) => sum + wanted[index], 0) / members.length;
  const start = Math.max(first + height / 2, Math.min(mean - extent / 2, last - height / 2 - extent));
  return { members, start };
}
