import { lastPart } from './kinds.ts';

const LONGEST_NAME = 200;

/** The names by which unpacked files are shown and chosen for: short, and each only once. */
export class UnpackedNames {
  private readonly taken: Set<string>;

  constructor(given: readonly string[]) {
    this.taken = new Set(given);
  }

  /** A name for an entry: its last part; with its folders where another file is called so, else with a number.
   *  Example: two entries "a/flows.csv" and "b/flows.csv" → "flows.csv", "b/flows.csv" */
  take(entry: string): string {
    const clean = entry.replace(/\p{Cc}|\p{Cf}/gu, '');
    const whole = clean.slice(-LONGEST_NAME);
    const name = [lastPart(clean).trim().slice(-LONGEST_NAME), whole].find((one) => one !== '' && !this.taken.has(one));
    const free = name ?? this.numbered(whole || 'unnamed');
    this.taken.add(free);
    return free;
  }

  private numbered(name: string): string {
    let number = 2;
    while (this.taken.has(`${number}/${name}`)) number++;
    return `${number}/${name}`;
  }
}
