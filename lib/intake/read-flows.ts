import { documentReader } from './documents/index.ts';
import { readHead } from './file-blocks.ts';
import { readTable } from './read-table.ts';
import type { ImportReport, ReadFlowsOptions } from './types.ts';
import { sheetAsText } from './workbook/index.ts';

/** Reads a file of daily flows, whatever its size and format, and hands on one part for each station once all of it is
 *  good.
 *
 *  Whether it is a table of text, a workbook or a document, and in a table the layout, delimiter, dates, unit and stations,
 *  are recognised from the content; what was given goes before. Rows that cannot be read are rejected one by one, with
 *  their number, text and reason; two unlike values for a day, an unknown station, or anything that leaves the meaning of
 *  the file open refuses the whole file.
 *  @returns counts in the unit of the file; `rejectedFile` is null, for the caller to fill in
 *  @throws IntakeError naming file, row, value and remedy; the signal's reason when aborted */
export async function readFlows(path: string, options: ReadFlowsOptions): Promise<ImportReport> {
  const { fileName, mapping, signal } = options;
  const head = await readHead(path, fileName);
  const document = documentReader(head);
  if (document !== null) return document.read(path, options);
  const sheet = await sheetAsText(path, { fileName, sheet: mapping?.sheet, signal });
  if (sheet === null) return readTable(path, head, options);
  try {
    const report = await readTable(sheet.path, await readHead(sheet.path, fileName), options);
    return {
      ...report,
      mapping: { ...report.mapping, sheet: sheet.sheet },
      ...{ sha256: sheet.sha256, warnings: [...sheet.warnings, ...report.warnings] },
    };
  } finally {
    await sheet.dispose();
  }
}
