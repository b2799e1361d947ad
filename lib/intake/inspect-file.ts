import { findDateOrder } from './date-order.ts';
import { documentReader } from './documents/index.ts';
import { type FileHead, readHead } from './file-blocks.ts';
import { firstLook } from './first-look.ts';

import { recognise } from './recognise/recognise.ts';
import { factsOf } from './recognise/stated-facts.ts';
import { type Inspection, type InspectOptions, IntakeError } from './types.ts';
import { unitOfQuantityProblem } from './unit-of-quantity.ts';
import { sheetAsText, workbookSheets } from './workbook/index.ts';

/** Rows of a sheet that are looked at: as many as the first megabyte of most tables has. */
const SHEET_ROWS = 3000;

/** Looks at the first megabyte of a flow file: what it is taken for, its first rows as they are understood, and what must
 *  be answered before it can be read. Only to learn whether day or month comes first are rows read beyond, up to the first
 *  that says it.
 *  @returns `mapping: null` when the file cannot be read whatever is answered; `problems` then says why */
export async function inspectFile(path: string, options: InspectOptions): Promise<Inspection> {
  const { fileName, mapping } = options;
  let sheets: string[] | null = null;
  try {
    const head = await readHead(path, fileName);
    const document = documentReader(head);
    if (document !== null) return await document.inspect(path, options);
    sheets = await workbookSheets(path, fileName);
    if (sheets === null) return await inspectTable(path, head, options);
    const sheet = await sheetAsText(path, { fileName, sheet: mapping?.sheet, mostRows: SHEET_ROWS });
    if (sheet === null) return await inspectTable(path, head, options);
    try {
      const seen = await inspectTable(sheet.path, await readHead(sheet.path, fileName), options);
      return { ...seen, mapping: seen.mapping && { ...seen.mapping, sheet: sheet.sheet }, sheets };
    } finally {
      await sheet.dispose();
    }
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    const nothing = { understood: [], others: [], facts: [], sheets };
    return { mapping: null, header: null, preview: [], problems: [error], valueCandidates: [], ...nothing };
  }
}

async function inspectTable(path: string, head: FileHead, options: InspectOptions): Promise<Inspection> {
  const plan = recognise(head, options);
  const { mapping, header, preview, previewLines, valueCandidates, others = [] } = plan;
  const wrongUnit = unitOfQuantityProblem(plan.file, mapping);
  const problems = [...plan.problems, ...(wrongUnit ? [wrongUnit] : [])];
  let orderOpen = false;
  if (plan.orderOpen) {
    const order = await findDateOrder(path, plan, { firstProof: true }).catch((error: unknown) => {
      if (!(error instanceof IntakeError)) throw error;
      problems.push(error);
      orderOpen = true;
      return 'dmy' as const;
    });
    mapping.date = { ...mapping.date, order };
  }
  const look = firstLook(plan, head, options, orderOpen);
  // What stands against reading the rows may have been found when they were looked at for their layout.
  const known = new Set(problems.map(({ message }) => message));
  problems.push(...look.problems.filter(({ message }) => !known.has(message)));
  const seen = { mapping, header, preview, previewLines, problems, valueCandidates };
  return { ...seen, understood: look.understood, others, facts: factsOf(plan.facts, look.codes), sheets: null };
}
