import { open, readFile } from 'node:fs/promises';
import { sniffDocument } from '../intake/documents/sniff.ts';
import { looksLikeRegistry } from '../intake/registry/looks-like-registry.ts';
import { IntakeError } from '../intake/types.ts';
import { type SheetText, sheetAsText } from '../intake/workbook/index.ts';
import type { FileKind } from './import-types.ts';

/** What is looked at of a file's beginning, bytes; of a sheet, rows. */
export const LOOKED_AT = 256 * 1024;
const ROWS_LOOKED_AT = 200;

/** What a file is, by what it holds and not by its name: see `recogniseKind`. Of a workbook, the sheet that is read
 *  decides: the one named; else the one of daily flows, or where there is none, the one that lists stations. */
export async function recogniseFile(path: string, fileName: string, sheet?: string): Promise<FileKind> {
  const head = await headOf(path);
  if (head[0] !== 0x50 || head[1] !== 0x4b) return recogniseKind(head);
  const options = { fileName, sheet, mostRows: ROWS_LOOKED_AT };
  const flows = await sheetOrNull(sheetAsText(path, options));
  if (flows !== null) return await kindOfSheet(flows);
  if (sheet !== undefined) return 'flows';
  const stations = await sheetOrNull(
    sheetAsText(path, { ...options, wanted: (text) => looksLikeRegistry(text, true) }),
  );
  return stations === null ? 'flows' : await kindOfSheet(stations);
}

/** What a file that is no workbook is. A document of time series is of flows; GeoJSON is a registry where its features
 *  are points, else a map layer; a table of stations, with their places or their areas and without dates, is a registry;
 *  anything else is taken for flows, whose reader says what is wrong with it.
 *  @param head  the first bytes of the file, UTF-8 where it is text */
export function recogniseKind(head: Uint8Array): FileKind {
  if (sniffDocument(head) !== null) return 'flows';
  const text = new TextDecoder().decode(head);
  if (/^\s*[{[]/.test(text)) return holdsPoints(text) ? 'registry' : 'layer';
  return looksLikeRegistry(head, head.length < LOOKED_AT) ? 'registry' : 'flows';
}

/** Whether the first shapes of a GeoJSON text are points. */
function holdsPoints(text: string): boolean {
  const shapes = text.matchAll(/"type"\s*:\s*"((?:Multi)?(?:Point|LineString|Polygon)|GeometryCollection)"/g);
  const kinds = [...shapes].map(([, kind]) => kind);
  return kinds.length > 0 && kinds.every((kind) => kind === 'Point');
}

/** Null where it would have to be asked which sheet is meant, or the workbook cannot be read: its reader says so. */
async function sheetOrNull(sheet: Promise<SheetText | null>): Promise<SheetText | null> {
  try {
    return await sheet;
  } catch (error) {
    if (error instanceof IntakeError) return null;
    throw error;
  }
}

async function kindOfSheet(sheet: SheetText): Promise<FileKind> {
  try {
    const text = await readFile(sheet.path);
    return looksLikeRegistry(text, true) ? 'registry' : 'flows';
  } finally {
    await sheet.dispose();
  }
}

async function headOf(path: string): Promise<Uint8Array> {
  const handle = await open(path);
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(LOOKED_AT), 0, LOOKED_AT, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await handle.close();
  }
}
