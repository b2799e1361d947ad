/** Characters that XML 1.0 cannot hold, even escaped. */
const NEVER = /[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu;

/** Text between tags. Characters that XML cannot hold become U+FFFD. */
export function elementText(text: string): string {
  return text
    .replace(NEVER, '\ufffd')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('\r', '&#13;');
}

/** Text of an attribute between double quotes. */
export function attributeText(text: string): string {
  return elementText(text).replaceAll('"', '&quot;').replaceAll('\t', '&#9;').replaceAll('\n', '&#10;');
}
