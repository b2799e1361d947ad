/** Words that stand where a value is missing, as monitoring agencies and spreadsheets write them. */
const WORDS = new Set(
  [
    ...['', '-', '--', '---', '.', '..', '*', '**', '***', '?'],
    ...['na', 'n/a', '#n/a', 'nan', 'null', 'none', 'nil', 'nd', 'm', 'missing', 'no data', 'nodata', 'lücke', 'gap'],
    // Reasons that agencies print in place of a value.
    ...['ice', 'eqp', 'bkw', 'dis', 'ssn', 'rat', 'mnt', 'zfl', 'fld', 'dry', 'tst', 'afl', 'pr', 'cr', 'frozen'],
  ].map((word) => word.toLowerCase()),
);

/** −99, −999, −9999, … with nothing but zeros or nines behind the point. */
const SENTINEL = /^-9{2,}(?:[.,](?:0*|9*))?$/;

/** True when a value's text says that there is no value: `NA`, `-999.00`, `Ice`, an empty field. Numbers of any other
 *  kind are values, negative ones too. Upper and lower case are the same. */
export function isMissingText(text: string): boolean {
  return SENTINEL.test(text) || WORDS.has(text.toLowerCase());
}
