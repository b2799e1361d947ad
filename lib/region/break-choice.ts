/** Which breaks are looked at. */
export interface BreakChoice {
  /** each station's own dated changes */
  changes: boolean;
  /** first low-flow years after a break, at every station; rising, each once */
  years: number[];
}

/** Breaks that may be chosen at once. */
const MOST_YEARS = 10;

/** Reads a choice of breaks: `changes`, or first low-flow years after a break, or both, with commas between.
 *  @returns  null for text that is no such list, or names more than 10 years
 *  Example: "changes,1975" → each station's own changes, and a break before 1975 */
export function parseBreakChoice(text: string): BreakChoice | null {
  const words = text.split(',').map((word) => word.trim());
  const years = new Set<number>();
  for (const word of words) {
    if (word === 'changes') continue;
    if (!/^[1-9]\d{3}$/.test(word)) return null;
    years.add(Number(word));
  }
  if (years.size > MOST_YEARS) return null;
  return { changes: words.includes('changes'), years: [...years].sort((a, b) => a - b) };
}

export const BREAK_CHOICE_HELP = `changes (each station’s dated changes), first low-flow years after a break, at most ${MOST_YEARS}, or both, with commas between`;
