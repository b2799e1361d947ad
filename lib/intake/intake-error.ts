/** A row that was not taken, with its place in the file. */
export interface RejectedRow {
  /** line number in the file, from 1 */
  row: number;
  text: string;
  reason: string;
}

/** What a person can answer so that a file can be read.
 *  century: which hundred years two-digit years stand for · daily-mean: whether several values a day become their mean ·
 *  codes: whether codes that differ by case or leading zeros are the registry's · correction: whether coordinates are
 *  swapped or run from 0 to 360 · quantity: which of several quantities is the flow · sheet: which sheet of a workbook */
export const NEEDS = [
  ...(['unit', 'station', 'date-order', 'mapping', 'area', 'revise', 'century', 'daily-mean', 'codes'] as const),
  ...(['correction', 'quantity', 'sheet', 'thousands'] as const),
] as const;
export type Need = (typeof NEEDS)[number];

/** Corrections of a registry's coordinates that a person may ask for; `none`: unlikely ones stand as they are. */
export const CORRECTIONS = ['swap-coordinates', 'longitude-360', 'none'] as const;
export type Correction = (typeof CORRECTIONS)[number];

/** A code as a file writes it, and that of the registry which it may be. */
export interface CodePair {
  written: string;
  registered: string;
}

/** A file that cannot be taken: names the file, the row where there is one, the value and the remedy. */
export class IntakeError extends Error {
  override name = 'IntakeError';
  constructor(
    readonly problem: {
      file: string;
      /** line number from 1 */
      row?: number;
      value?: string;
      /** what is wrong */
      message: string;
      /** what to do about it */
      remedy: string;
      /** machine-readable: the screen asks for what is missing */
      needs?: Need;
      /** with needs 'correction': what would put the rows right */
      corrections?: Correction[];
      /** with needs 'codes': the codes as written and those of the registry that they may be */
      pairs?: CodePair[];
      /** every row at fault, where several are (a registry is taken whole or not at all) */
      rows?: RejectedRow[];
    },
  ) {
    const place = problem.row === undefined ? problem.file : `${problem.file}, row ${problem.row}`;
    const value = problem.value === undefined ? '' : ` (“${problem.value}”)`;
    super(`${place}: ${problem.message}${value}. ${problem.remedy}`);
  }
}
