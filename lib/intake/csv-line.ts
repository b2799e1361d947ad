/** One field of a CSV file by RFC 4180: quoted when it holds a comma, a quote or a line end, quotes doubled.
 *
 *  The text is written exactly as it is. Spreadsheets take a text that begins with `=`, `+`, `-` or `@` for a formula;
 *  putting an apostrophe before it would change the data for every other program and would not survive being read back,
 *  so it is not done: a file that says what was imported must say it letter for letter. */
function csvField(text: string): string {
  return /[",\r\n]/.test(text) || text !== text.trim() ? `"${text.replaceAll('"', '""')}"` : text;
}

/** One row with its line end (CR LF, as RFC 4180 has it). */
export function csvLine(fields: readonly string[]): string {
  return `${fields.map(csvField).join(',')}\r\n`;
}
