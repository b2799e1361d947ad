import { closeSync, openSync, writeSync } from 'node:fs';
import type { CellFormat } from './cell-formats.ts';
import { mergedCells } from './merged-cells.ts';
import type { WorkbookPackage } from './package.ts';
import type { Sheet } from './sheet-list.ts';
import { SheetRows } from './sheet-rows.ts';

/** Characters gathered before they are written. */
const BLOCK = 1 << 20;

/** What the sheets of a workbook share. */
export interface SheetParts {
  strings: readonly string[];
  formats: readonly CellFormat[];
  from1904: boolean;
}

/** Writes a sheet as tab-delimited text into a new file, a line for each row.
 *  @returns warnings */
export async function writeSheet(
  workbook: WorkbookPackage,
  sheet: Sheet,
  parts: SheetParts,
  to: { path: string; mostRows: number; signal?: AbortSignal },
): Promise<string[]> {
  const merged = await mergedCells(workbook, sheet.part, to.signal);
  const descriptor = openSync(to.path, 'wx');
  try {
    let text = '';
    const flush = () => {
      writeSync(descriptor, text);
      text = '';
    };
    const rows = new SheetRows({
      ...{ ...parts, file: `${workbook.file}, sheet “${sheet.name}”`, merged, mostRows: to.mostRows },
      write(line) {
        text += line;
        if (text.length > BLOCK) flush();
      },
    });
    await workbook.read(sheet.part, rows, to.signal);
    flush();
    if (rows.formulas === 0) return [];
    return [
      `${rows.formulas} formulas have no stored value, the first in ${rows.firstFormula}: open the workbook in a spreadsheet program and save it.`,
    ];
  } finally {
    closeSync(descriptor);
  }
}
