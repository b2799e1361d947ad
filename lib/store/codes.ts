/** A quality code as a file wrote it, and the flag bits it was understood as. */
export interface Code {
  text: string;
  bits: number;
}

/** In a part's codes: the file has no row for this day. */
export const NO_ROW = 255;

/** Flag bits of each day, from a part's codes. */
export function flagsOfCodes(codes: Uint8Array, codeList: readonly Code[]): Uint8Array {
  const flags = new Uint8Array(codes.length);
  if (codeList.every(({ bits }) => bits === 0)) return flags;
  const bits = new Uint8Array(256);
  for (const [index, code] of codeList.entries()) bits[index] = code.bits;
  for (let day = 0; day < codes.length; day++) flags[day] = bits[codes[day]];
  return flags;
}
