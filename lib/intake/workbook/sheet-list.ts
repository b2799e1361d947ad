import { attribute } from '../documents/xml-events.ts';
import { IntakeError } from '../types.ts';
import type { WorkbookPackage } from './package.ts';

/** A sheet of cells. */
export interface Sheet {
  name: string;
  hidden: boolean;
  part: string;
}

/** Where a workbook keeps what. */
export interface WorkbookPlan {
  sheets: Sheet[];
  sharedStrings: string | null;
  styles: string | null;
  /** dates are counted from 1904 */
  from1904: boolean;
}

const MOST_SHEETS = 10_000;

/** The sheets of a workbook in its order, without charts, and the parts that they need.
 *  @throws IntakeError when there is no sheet */
export async function workbookPlan(workbook: WorkbookPackage): Promise<WorkbookPlan> {
  const root = await relations(workbook, '_rels/.rels', '');
  const main = [...root.values()].find(({ type }) => type.endsWith('/officeDocument'))?.target ?? 'xl/workbook.xml';
  const folder = main.slice(0, main.lastIndexOf('/') + 1);
  const parts = await relations(workbook, `${folder}_rels/${main.slice(folder.length)}.rels`, folder);
  const listed: { name: string; hidden: boolean; relation: string }[] = [];
  let from1904 = false;
  await workbook.read(main, {
    open(name, attributes) {
      if (name === 'workbookPr') from1904 = /^(?:1|true)$/.test(attribute(attributes, 'date1904'));
      else if (name === 'sheet' && listed.length < MOST_SHEETS) {
        const hidden = /hidden/i.test(attribute(attributes, 'state'));
        // r:id stands beside sheetId, whose name ends alike.
        const relation = Object.entries(attributes).find(([key]) => /:id$/i.test(key))?.[1] ?? '';
        listed.push({ name: attribute(attributes, 'name'), hidden, relation });
      }
    },
    close: () => undefined,
  });
  const sheets = listed.flatMap(({ name, hidden, relation }) => {
    const part = parts.get(relation);
    return part?.type.endsWith('/worksheet') ? [{ name, hidden, part: part.target }] : [];
  });
  if (sheets.length === 0) {
    throw new IntakeError({
      file: workbook.file,
      message: 'the workbook has no sheet of cells',
      remedy: 'Check the file',
    });
  }
  const partOf = (kind: string) => [...parts.values()].find(({ type }) => type.endsWith(kind))?.target ?? null;
  return { sheets, sharedStrings: partOf('/sharedStrings'), styles: partOf('/styles'), from1904 };
}

/** What a part refers to, by the id of the reference. */
async function relations(workbook: WorkbookPackage, part: string, folder: string) {
  const found = new Map<string, { type: string; target: string }>();
  if (!workbook.has(part)) return found;
  await workbook.read(part, {
    open(name, attributes) {
      if (name !== 'Relationship' || found.size >= MOST_SHEETS) return;
      const target = attribute(attributes, 'Target');
      const absolute = target.startsWith('/') ? target.slice(1) : `${folder}${target}`;
      found.set(attribute(attributes, 'Id'), { type: attribute(attributes, 'Type'), target: withoutDots(absolute) });
    },
    close: () => undefined,
  });
  return found;
}

/** `xl/../xl/worksheets/sheet1.xml` → `xl/worksheets/sheet1.xml`: the name of a part, never of a file. */
function withoutDots(path: string): string {
  const names: string[] = [];
  for (const name of path.split('/')) {
    if (name === '..') names.pop();
    else if (name !== '.' && name !== '') names.push(name);
  }
  return names.join('/');
}
