import type { WorkbookPackage } from './package.ts';

/** Merged blocks that are kept; a sheet of data has a handful. */
const MOST_BLOCKS = 100_000;
const END_OF_ROWS = /<\/(?:\w+:)?sheetData>/;
const BLOCK = /<(?:\w+:)?mergeCell\s[^>]*?ref="([A-Z]{1,3})(\d{1,7}):([A-Z]{1,3})(\d{1,7})"/g;

/** The cells of a sheet that a merged block hides: all but its first. */
export class MergedCells {
  private readonly blocks: { top: number; left: number; bottom: number; right: number }[] = [];
  private last = 0;

  add(block: { top: number; left: number; bottom: number; right: number }): void {
    if (this.blocks.length < MOST_BLOCKS) this.blocks.push(block);
    this.last = Math.max(this.last, block.bottom);
  }

  /** The blocks that a row lies in. */
  ofRow(row: number): { top: number; left: number; right: number }[] {
    if (row > this.last) return [];
    return this.blocks.filter(({ top, bottom }) => row >= top && row <= bottom);
  }
}

/** Finds the merged blocks of a sheet, which stand behind its rows. */
export async function mergedCells(workbook: WorkbookPackage, part: string, signal?: AbortSignal): Promise<MergedCells> {
  const merged = new MergedCells();
  let carried = '';
  let behindRows = false;
  for await (const chunk of workbook.bytes(part)) {
    signal?.throwIfAborted();
    // What is looked for is ASCII in every encoding of bytes.
    let text = carried + chunk.toString('latin1');
    if (!behindRows) {
      const end = END_OF_ROWS.exec(text);
      if (end === null) {
        carried = text.slice(-40);
        continue;
      }
      behindRows = true;
      text = text.slice(end.index);
    }
    let after = 0;
    for (const found of text.matchAll(BLOCK)) {
      const [whole, left, top, right, bottom] = found;
      after = found.index + whole.length;
      merged.add({
        ...{ top: Number(top), bottom: Number(bottom), left: columnNumber(left), right: columnNumber(right) },
      });
    }
    carried = text.slice(Math.max(after, text.length - 200));
  }
  return merged;
}

/** Position of a column from 0: A → 0, AA → 26. */
export function columnNumber(letters: string): number {
  let number = 0;
  for (let at = 0; at < letters.length; at++) number = number * 26 + letters.charCodeAt(at) - 64;
  return number - 1;
}
