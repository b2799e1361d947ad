import { basisSentence, type ResolvedBasis } from '../basis.ts';
import { METHODS_VERSION } from '../region/methods-version.ts';
import { PROGRAM_VERSION } from './program-version.ts';

/** What a product rests on, so that anyone can make the same one again. */
export interface Provenance {
  region: { slug: string; name: string; invented: boolean };
  basis: ResolvedBasis;
  /** SHA-256 over the records, marks and facts of every station of the region */
  dataHash: string;
  /** things a reader must know before using the numbers */
  warnings: readonly string[];
}

/** The same as it stands at the head of every JSON product and in the notes beside every CSV file. */
export function provenanceNotes({ region, basis, dataHash, warnings }: Provenance): Record<string, unknown> {
  return {
    region: region.name,
    invented: region.invented,
    basis,
    basisSentence: basisSentence(basis),
    dataHash,
    program: 'Hungerstone',
    programVersion: PROGRAM_VERSION,
    methodsVersion: METHODS_VERSION,
    warnings,
  };
}
