import { readHead } from './file-blocks.ts';
import { recognise } from './recognise/recognise.ts';
import { type Inspection, type InspectOptions, IntakeError } from './types.ts';

/** Looks at the first megabyte of a flow file: what it is taken for, its first rows, and what must be answered before
 *  it can be read. Reads no rows beyond, so it is quick for any size.
 *  @returns `mapping: null` when the file cannot be read whatever is answered; `problems` then says why */
export async function inspectFile(path: string, options: InspectOptions): Promise<Inspection> {
  try {
    const plan = recognise(await readHead(path, options.fileName), options);
    const { mapping, header, preview, problems, valueCandidates } = plan;
    return { mapping, header, preview, problems, valueCandidates };
  } catch (error) {
    if (!(error instanceof IntakeError)) throw error;
    return { mapping: null, header: null, preview: [], problems: [error], valueCandidates: [] };
  }
}
