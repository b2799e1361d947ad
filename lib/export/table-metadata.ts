import { basisSentence } from '../basis.ts';
import type { Column } from './csv.ts';
import { PROGRAM_VERSION } from './program-version.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';

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
    notes: [provenanceNotes(from)],
  };
}

/** The name that the metadata of a CSV file has, so that programs find it beside the file. */
export function metadataName(fileName: string): string {
  return `${fileName}-metadata.json`;
}
