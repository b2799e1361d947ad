import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdtemp, readFile, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { recognise } from '../recognise/recognise.ts';
import { IntakeError } from '../types.ts';
import { cellFormats } from './cell-formats.ts';
import { openWorkbook, type WorkbookPackage } from './package.ts';
import { sharedStrings } from './shared-strings.ts';
import { type Sheet, workbookPlan } from './sheet-list.ts';
import { type SheetParts, writeSheet } from './write-sheet.ts';

/** Rows by which it is told what a sheet holds, and sheets that are looked at for it. */
const LOOK_ROWS = 200;
const LOOK_SHEETS = 50;

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

/** The sheet names of a workbook (.xlsx), in its order; null for any other file.
 *  @throws IntakeError for a damaged workbook, and for workbooks of other kinds, by name */
export async function workbookSheets(path: string, fileName: string): Promise<string[] | null> {
  const workbook = await openWorkbook(path, fileName);
  if (workbook === null) return null;
  try {
    return (await workbookPlan(workbook)).sheets.map(({ name }) => name);
  } finally {
    workbook.close();
  }
}

/** Writes a sheet of a workbook as text; null for a file that is no workbook. Formulas count by the values that the
 *  workbook stores for them.
 *  @throws IntakeError; `needs: 'sheet'` where several sheets may be meant */
export async function sheetAsText(path: string, options: SheetOptions): Promise<SheetText | null> {
  const { fileName, signal, mostRows = Number.POSITIVE_INFINITY } = options;
  const workbook = await openWorkbook(path, fileName);
  if (workbook === null) return null;
  let folder: string | null = null;
  try {
    const plan = await workbookPlan(workbook);
    const parts: SheetParts = {
      strings: await sharedStrings(workbook, plan.sharedStrings, signal),
      formats: await cellFormats(workbook, plan.styles),
      from1904: plan.from1904,
    };
    folder = await mkdtemp(join(tmpdir(), 'hungerstone-sheet-'));
    const sheet = await chosenSheet(plan.sheets, { workbook, parts, folder, options });
    const text = join(folder, 'sheet.txt');
    const warnings = await writeSheet(workbook, sheet, parts, { path: text, mostRows, signal });
    if ((await stat(text)).size === 0) throw emptySheet(fileName, sheet.name);
    const made = folder;
    folder = null;
    return {
      ...{ path: text, sheet: sheet.name, sheets: plan.sheets.map(({ name }) => name) },
      ...{ sha256: await hashOf(path, signal), warnings },
      dispose: () => rm(made, { recursive: true, force: true }),
    };
  } finally {
    workbook.close();
    if (folder !== null) await rm(folder, { recursive: true, force: true });
  }
}

interface Choice {
  workbook: WorkbookPackage;
  parts: SheetParts;
  folder: string;
  options: SheetOptions;
}

/** The sheet asked for; else the only one with anything in it; else the only visible one that looks as wanted. */
async function chosenSheet(sheets: readonly Sheet[], choice: Choice): Promise<Sheet> {
  const { fileName, sheet: asked, wanted = looksLikeFlows } = choice.options;
  const names = () => sheets.map(({ name, hidden }) => `“${name}”${hidden ? ' (hidden)' : ''}`).join(', ');
  const ask = (message: string, value?: string) =>
    new IntakeError({
      ...{ file: fileName, message, remedy: `Say which sheet is to be read: ${names()}`, needs: 'sheet' },
      ...(value === undefined ? {} : { value }),
    });
  if (asked !== undefined) {
    const found =
      sheets.find(({ name }) => name === asked) ??
      sheets.find(({ name }) => name.toLowerCase() === asked.toLowerCase());
    if (found === undefined) throw ask('the workbook has no such sheet', asked);
    return found;
  }
  if (sheets.length === 1) return sheets[0];
  const filled: Sheet[] = [];
  const fitting: Sheet[] = [];
  for (const sheet of sheets.filter(({ hidden }) => !hidden).slice(0, LOOK_SHEETS)) {
    const head = await headOf(sheet, choice);
    if (head.every((byte) => byte === 10)) continue;
    filled.push(sheet);
    if (wanted(head)) fitting.push(sheet);
  }
  if (fitting.length === 1) return fitting[0];
  if (filled.length === 1) return filled[0];
  throw ask(
    fitting.length > 1
      ? `${fitting.length} sheets of the workbook may be meant`
      : 'no sheet of the workbook looks like a table of daily flows',
  );
}

async function headOf(sheet: Sheet, { workbook, parts, folder, options }: Choice): Promise<Uint8Array> {
  const path = join(folder, 'head.txt');
  await writeSheet(workbook, sheet, parts, { path, mostRows: LOOK_ROWS, signal: options.signal });
  try {
    return await readFile(path);
  } finally {
    await rm(path, { force: true });
  }
}

/** Whether a text is a table that can be read as daily flows, be it after an answer. */
function looksLikeFlows(bytes: Uint8Array): boolean {
  try {
    const { problems } = recognise({ bytes, size: bytes.length }, { fileName: 'sheet' });
    return problems.every(({ problem }) => problem.needs !== undefined && problem.needs !== 'mapping');
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    return false;
  }
}

function emptySheet(file: string, sheet: string): IntakeError {
  return new IntakeError({ file, value: sheet, message: 'the sheet is empty', remedy: 'Name another sheet' });
}

async function hashOf(path: string, signal?: AbortSignal): Promise<string> {
  const hash = createHash('sha256');
  for await (const chunk of createReadStream(path)) {
    signal?.throwIfAborted();
    hash.update(chunk as Buffer);
  }
  return hash.digest('hex');
}
