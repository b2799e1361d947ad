import { findDateOrder } from './date-order.ts';
import { readHead } from './file-blocks.ts';
import { recognise } from './recognise/recognise.ts';
import { type Inspection, type InspectOptions, IntakeError } from './types.ts';

/** Looks at the first megabyte of a flow file: what it is taken for, its first rows, and what must be answered before
 *  it can be read. Only to learn whether day or month comes first are rows read beyond, up to the first that says it.
 *  @returns `mapping: null` when the file cannot be read whatever is answered; `problems` then says why */
export async function inspectFile(path: string, options: InspectOptions): Promise<Inspection> {
  try {
    const plan = recognise(await readHead(path, options.fileName), options);
    const { mapping, header, preview, previewLines, problems, valueCandidates } = plan;
    if (plan.orderOpen) {
      const order = await findDateOrder(path, plan, { firstProof: true }).catch((error: unknown) => {
        if (!(error instanceof IntakeError)) throw error;
        problems.push(error);
        return 'dmy' as const;
      });
      mapping.date = { ...mapping.date, order };
    }
    const seen = { mapping, header, preview, previewLines, problems, valueCandidates };
    return { ...seen, understood: [], others: [], facts: [], sheets: null };
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    const nothing = { understood: [], others: [], facts: [], sheets: null };
    return { mapping: null, header: null, preview: [], problems: [error], valueCandidates: [], ...nothing };
  }
}
