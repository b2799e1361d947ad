import { attribute, type ElementHandler } from '../documents/xml-events.ts';
import { type DateKind, dateKind } from './date-serial.ts';
import type { WorkbookPackage } from './package.ts';

/** How the numbers of a cell style are to be written. */
export interface CellFormat {
  date: DateKind | null;
  /** numbers are shown with leading zeros up to so many digits (codes of stations); 0 for none */
  digits: number;
}

const PLAIN: CellFormat = { date: null, digits: 0 };
const MOST_STYLES = 100_000;

/** The formats of a workbook's cell styles, by their numbers. */
export async function cellFormats(workbook: WorkbookPackage, part: string | null): Promise<CellFormat[]> {
  if (part === null || !workbook.has(part)) return [PLAIN];
  const codes = new Map<number, string>();
  const ids: number[] = [];
  let inCells = false;
  const handler: ElementHandler = {
    open(name, attributes) {
      if (name === 'numFmt') {
        const id = Number(attribute(attributes, 'numFmtId'));
        if (codes.size < MOST_STYLES) codes.set(id, attribute(attributes, 'formatCode'));
      } else if (name === 'cellXfs') inCells = true;
      else if (name === 'xf' && inCells && ids.length < MOST_STYLES) {
        ids.push(Number(attribute(attributes, 'numFmtId') || 0));
      }
    },
    close(name) {
      if (name === 'cellXfs') inCells = false;
    },
  };
  await workbook.read(part, handler);
  return ids.map((id) => {
    const code = codes.get(id);
    return { date: dateKind(id, code), digits: code !== undefined && /^0{2,30}$/.test(code) ? code.length : 0 };
  });
}
