/** Codes of stations as one parameter of an address, with commas between; a comma or percent sign inside a code is written
 *  by its number. Example: ["01", "A,2"] → "01,A%2C2" */
export const writeCodes = (codes: readonly string[]): string =>
  codes.map((code) => code.replaceAll('%', '%25').replaceAll(',', '%2C')).join(',');

/** The codes again. One typed by hand may hold a bare percent sign. */
export const readCodes = (text: string): string[] => text.split(',').map(decoded).filter(Boolean);

function decoded(code: string): string {
  try {
    return decodeURIComponent(code);
  } catch {
    return code;
  }
}
