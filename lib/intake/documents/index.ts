import type { FileHead } from '../file-blocks.ts';
import type { ImportReport, Inspection, InspectOptions, Layout, ReadFlowsOptions } from '../types.ts';

/** Reads documents of time series, whose values have no place by column. */
export interface DocumentReader {
  layout: Layout;
  /** What the document holds and what must be answered before it can be read.
   *  @returns `mapping: null` when it cannot be read whatever is answered; never throws IntakeError */
  inspect(path: string, options: InspectOptions): Promise<Inspection>;
  /** Reads the document whole, whatever its size; emits one part a station and quantity when all of it is good.
   *  @throws IntakeError; the signal's reason when aborted */
  read(path: string, options: ReadFlowsOptions): Promise<ImportReport>;
}

/** The reader for a document that begins with these bytes; null where they begin no document of time series. */
export function documentReader(_head: FileHead): DocumentReader | null {
  return null;
}
