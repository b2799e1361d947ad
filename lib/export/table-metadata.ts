import { basisSentence, type ResolvedBasis } from '../basis.ts';
import type { Column } from './csv.ts';
import { PROGRAM_VERSION } from './program-version.ts';

/** What a table rests on, so that anyone can make the same one again. */
export interface Provenance {
  region: string;
  /** true for made-up data */
  invented: boolean;
  basis: ResolvedBasis;
  /** SHA-256 over the records, marks and facts of every station of the region */
  dataHash: string;
  methodsVersion: number;
  /** things a reader must know before using the numbers */
  warnings: readonly string[];
}

/** Metadata of a CSV file by the W3C's "CSV on the Web" vocabulary (https://www.w3.org/TR/tabular-metadata/).
 *
 *  Columns carry their names, datatypes, meaning and unit (as schema.org's `unitText`); what the table rests on stands
 *  in `notes`, the place the vocabulary keeps for annotations of any kind.
 *  @param fileName  name of the CSV file that it lies beside */
export function tableMetadata<Row>(
  fileName: string,
  title: string,
  columns: readonly Column<Row>[],
  from: Provenance,
): Record<string, unknown> {
  return {
    '@context': ['http://www.w3.org/ns/csvw', { '@language': 'en' }],
    url: fileName,
    'dc:title': title,
    'dc:description': basisSentence(from.basis),
    'schema:softwareVersion': PROGRAM_VERSION,
    dialect: { encoding: 'utf-8', lineTerminators: ['\r\n'], quoteChar: '"', doubleQuote: true, header: true },
    tableSchema: {
      columns: columns.map((column) => ({
        name: column.name,
        titles: column.name,
        datatype: column.datatype,
        'dc:description': column.description,
        ...(column.unit === undefined ? {} : { 'schema:unitText': column.unit }),
      })),
    },
    notes: [
      {
        region: from.region,
        invented: from.invented,
        basis: from.basis,
        basisSentence: basisSentence(from.basis),
        dataHash: from.dataHash,
        program: 'Hungerstone',
        programVersion: PROGRAM_VERSION,
        methodsVersion: from.methodsVersion,
        warnings: from.warnings,
      },
    ],
  };
}
