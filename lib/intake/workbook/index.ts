/** A sheet of a workbook as a tab-delimited text file, one line a row of the sheet, so that row numbers agree. */
export interface SheetText {
  /** of the temporary text file */
  path: string;
  sheet: string;
  /** the names of all sheets, in the workbook's order */
  sheets: string[];
  /** of the workbook itself */
  sha256: string;
  warnings: string[];
  /** removes the temporary file */
  dispose(): Promise<void>;
}

export interface SheetOptions {
  fileName: string;
  /** name of the sheet; absent: the only one that looks as wanted */
  sheet?: string;
  /** only so many rows are written, for a look at the file */
  mostRows?: number;
  /** whether a sheet that begins with these bytes of text is one of those looked for; absent: daily flows */
  wanted?: (head: Uint8Array) => boolean;
  signal?: AbortSignal;
}

/** The sheet names of a workbook (.xlsx), in its order; null for any other file. */
export async function workbookSheets(_path: string, _fileName: string): Promise<string[] | null> {
  return null;
}

/** Writes a sheet of a workbook as text; null for a file that is no workbook.
 *  @throws IntakeError; `needs: 'sheet'` where several sheets may be meant */
export async function sheetAsText(_path: string, _options: SheetOptions): Promise<SheetText | null> {
  return null;
}
