import type { NamedSite } from './pair-types.ts';

/** A station as sentences call it: by its name, else by its code. */
export const called = ({ code, name }: NamedSite): string => (name === '' ? code : name);

/** Example: ["A", "B", "C"] → "A, B and C" */
export function listed(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words[words.length - 1]}`;
}

/** Example: (1, "common year") → "1 common year" */
export const counted = (number: number, noun: string): string => `${number} ${noun}${number === 1 ? '' : 's'}`;
