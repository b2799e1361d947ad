/** Colour and dash of the lines of a figure. Twelve pairs, none repeated: six colours against four dashes. */
export const MAX_LINES = 12;

const COLOURS = 6;
const DASHES = ['', '8 3', '2 3', '10 3 2 3'];

export function lineLook(index: number): { colour: string; dash: string } {
  return { colour: `var(--line-${(index % COLOURS) + 1})`, dash: DASHES[index % DASHES.length] };
}
