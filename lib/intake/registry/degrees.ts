/** Reads a latitude or longitude: decimal degrees (`-68.5`), or degrees and minutes and perhaps seconds, with their signs or
 *  blanks or colons between them (`68°30'15.5" W`, `68 30 15`, `W68:30.25`), the hemisphere as a letter or a sign.
 *  @param axis  whose letters count: N and S, or E and W. An O is east in some languages and west in others, so it says
 *               nothing
 *  @returns     degrees, south and west negative; NaN when the text is no such angle
 *  Example: parseDegrees('46°30′36″S', 'latitude', false) → −46.51 */
export function parseDegrees(text: string, axis: 'latitude' | 'longitude', decimalComma: boolean): number {
  const letters = axis === 'latitude' ? 'NS' : 'EW';
  const pointed = (decimalComma ? text.replace(/(\d),(\d)/g, '$1.$2') : text).replace(/[−–]/g, '-').trim();
  const plain = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
  if (plain.test(pointed)) return Number(pointed);
  // A small s right behind a number is one of seconds: 47d15m36s.
  const at = `^[${letters}](?![a-z])|(?<![a-z])[${letters}]$|(?<=\\s)[${letters.toLowerCase()}]$`;
  const letter = (new RegExp(at).exec(pointed)?.[0] ?? '').toUpperCase();
  const rest = pointed.replace(new RegExp(at), '').trim();
  const parts =
    /^([+-]?)\s*(\d{1,3}(?:\.\d*)?)\s*[°ºd:\s]\s*(?:(\d{1,2}(?:\.\d*)?)\s*(?:['’′m:]|\s|$)\s*)?(?:(\d{1,2}(?:\.\d*)?)\s*(?:"|”|″|''|’’|′′|s)?)?$/i;
  const found = plain.test(rest) && letter !== '' ? ['', '', rest] : parts.exec(rest);
  if (!found) return Number.NaN;
  const [, sign = '', degrees, minutes = '0', seconds = '0'] = found;
  if (!(Number(minutes) < 60) || !(Number(seconds) < 60)) return Number.NaN;
  // A fraction stands only in the last part.
  const written = [degrees, found[3], found[4]].filter((part) => part !== undefined);
  if (written.slice(0, -1).some((part) => part.includes('.'))) return Number.NaN;
  if (letter !== '' && (sign === '-' || degrees.startsWith('-'))) return Number.NaN;
  const size = Number(degrees) + Number(minutes) / 60 + Number(seconds) / 3600;
  // A second of arc is 30 m: what stands behind eleven decimals is rounding.
  const angle = written.length > 1 ? Number(size.toFixed(11)) : size;
  return sign === '-' || letter === 'S' || letter === 'W' ? -angle : angle;
}
