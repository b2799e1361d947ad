import { zipped } from '../../../zipped.ts';

/** A workbook put together by hand from its parts (ECMA-376), for what no writer would write. */
export interface HandMade {
  /** by sheet name: the content of sheetData, and what stands behind it */
  sheets: { name: string; rows: string; behind?: string; state?: string }[];
  strings?: string[];
  /** number formats by their codes; style n + 1 shows the n-th, style 0 is general */
  formats?: string[];
  from1904?: boolean;
}

const MAIN = 'xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"';
const OFFICE = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const PACKAGE = 'http://schemas.openxmlformats.org/package/2006/relationships';

/** Named like the relations of a part, targets relative to it. */
const relations = (all: [id: string, type: string, target: string][]) =>
  `<Relationships xmlns="${PACKAGE}">${all
    .map(([id, type, target]) => `<Relationship Id="${id}" Type="${OFFICE}/${type}" Target="${target}"/>`)
    .join('')}</Relationships>`;

export function handMade({ sheets, strings = [], formats = [], from1904 = false }: HandMade): Uint8Array {
  const parts: Record<string, string> = {
    '[Content_Types].xml': '<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"/>',
    '_rels/.rels': relations([['r1', 'officeDocument', 'xl/workbook.xml']]),
    'xl/workbook.xml': `<workbook ${MAIN} xmlns:r="${OFFICE}"><workbookPr date1904="${from1904 ? 1 : 0}"/><sheets>${sheets
      .map(
        ({ name, state }, at) =>
          `<sheet name="${name}" sheetId="${at + 1}"${state ? ` state="${state}"` : ''} r:id="s${at}"/>`,
      )
      .join('')}</sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': relations([
      ...sheets.map((_, at): [string, string, string] => [`s${at}`, 'worksheet', `worksheets/sheet${at + 1}.xml`]),
      ['strings', 'sharedStrings', 'sharedStrings.xml'],
      ['styles', 'styles', '/xl/styles.xml'],
    ]),
    'xl/sharedStrings.xml': `<sst ${MAIN}>${strings.map((text) => `<si>${text}</si>`).join('')}</sst>`,
    'xl/styles.xml': `<styleSheet ${MAIN}><numFmts>${formats
      .map((code, at) => `<numFmt numFmtId="${200 + at}" formatCode="${code.replaceAll('"', '&quot;')}"/>`)
      .join('')}</numFmts><cellXfs><xf numFmtId="0"/>${formats
      .map((_, at) => `<xf numFmtId="${200 + at}" applyNumberFormat="1"/>`)
      .join('')}<xf numFmtId="14"/></cellXfs></styleSheet>`,
  };
  for (const [at, { rows, behind = '' }] of sheets.entries()) {
    parts[`xl/worksheets/sheet${at + 1}.xml`] =
      `<worksheet ${MAIN}><dimension ref="A1"/><sheetData>${rows}</sheetData>${behind}</worksheet>`;
  }
  return zipped(parts);
}

/** A row of cells: numbers, and texts in line; null leaves a cell out. */
export function rowOf(number: number, cells: (string | number | null)[]): string {
  const texts = cells.map((cell, at) => {
    const place = `${String.fromCharCode(65 + at)}${number}`;
    if (cell === null) return '';
    return typeof cell === 'number'
      ? `<c r="${place}"><v>${cell}</v></c>`
      : `<c r="${place}" t="inlineStr"><is><t>${cell}</t></is></c>`;
  });
  return `<row r="${number}">${texts.join('')}</row>`;
}
