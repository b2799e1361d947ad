import { FLAG_DEFINITION, NO_FLAGS, VALUE_DEFINITION } from '../intake/documents/qualifier.ts';
import { FLAG, FLAG_NAMES } from '../series/daily-series.ts';
import type { DayCode } from '../series/day-codes.ts';
import { elementText } from './xml-text.ts';

const QUALITY = 'http://www.opengis.net/def/waterml/2.0/quality';
const NIL = 'http://www.opengis.net/def/nil/OGC/0';

/** The terms that the qualifiers of a document use. */
export const DICTIONARY: readonly { id: string; name: string; remarks: string }[] = [
  {
    id: FLAG_DEFINITION.slice(1),
    name: 'Flag as written',
    remarks: `The quality code that the source wrote beside the value. The description says how it was understood: ${FLAG_NAMES.join(', ')}, several of them, or ${NO_FLAGS}.`,
  },
  {
    id: VALUE_DEFINITION.slice(1),
    name: 'Text in place of the value',
    remarks: 'What the source wrote in the place of the value, or before its number.',
  },
];

/** The code that most days with a value have, where it says anything and nothing stands in the place of the value; null
 *  when points had better speak for themselves. */
export function usualCode({
  values,
  codes,
  codeList,
}: {
  values: Float64Array;
  codes: Uint8Array;
  codeList: readonly DayCode[];
}): number | null {
  const counts = new Float64Array(256);
  for (let at = 0; at < codes.length; at++) if (!Number.isNaN(values[at])) counts[codes[at]]++;
  let most = 0;
  for (let code = 1; code < codeList.length; code++) if (counts[code] > counts[most]) most = code;
  const usual = codeList[most];
  if (usual === undefined || counts[most] < 2) return null;
  return (usual.text === '' && usual.bits === 0) || usual.valueText !== undefined ? null : most;
}

/** What stands beside a value, or beside all that say nothing else: quality, reason of a missing value, qualifiers, in the
 *  order of the schema.
 *  @param always  also a code that says nothing is written, for the series has another for its points
 *  @returns       empty where there is nothing to say */
export function pointMetadata(code: DayCode, missing: boolean, always = false): string {
  const { text, bits, valueText } = code;
  // Beside a text in the value's place also “none” is said: a reader must not take the text for a flag.
  const says = text !== '' || bits !== 0 || valueText !== undefined;
  return [
    quality(bits),
    missing ? `<wml2:nilReason xlink:href="${NIL}/missing" xlink:title="missing"/>` : '',
    says || always ? category(FLAG_DEFINITION, text, namesOf(bits)) : '',
    valueText === undefined ? '' : category(VALUE_DEFINITION, valueText, null),
    bits & FLAG['below-detection'] && !missing
      ? `<wml2:censoredReason xlink:href="${NIL}/BelowDetectionRange" xlink:title="below detection range"/>`
      : '',
  ].join('');
}

/** The standard's own words for what a flag says, for programs that read no others. */
function quality(bits: number): string {
  const word =
    bits & FLAG.suspect ? 'suspect' : bits & FLAG.estimated ? 'estimate' : bits & FLAG.provisional ? 'unchecked' : null;
  return word === null ? '' : `<wml2:quality xlink:href="${QUALITY}/${word}" xlink:title="${word}"/>`;
}

function category(definition: string, value: string, description: string | null): string {
  const described = description === null ? '' : `<swe:description>${description}</swe:description>`;
  return `<wml2:qualifier><swe:Category definition="${definition}">${described}<swe:value>${elementText(value)}</swe:value></swe:Category></wml2:qualifier>`;
}

function namesOf(bits: number): string {
  return FLAG_NAMES.filter((name) => (bits & FLAG[name]) !== 0).join(' ') || NO_FLAGS;
}
