const PLACE = /^(.+?)\s+((?:at|above|below|near|nr|by|upstream|downstream)\b.*)$/i;

/** A station's name in two lines where it says river and place, so that narrow columns cut off neither.
 *  Example: "Little Ambry at Sallow" → ["Little Ambry", "at Sallow"]; "Ambry" → ["Ambry", ""] */
export function nameLines(name: string): [string, string] {
  const match = PLACE.exec(name);
  return match ? [match[1], match[2]] : [name, ''];
}
