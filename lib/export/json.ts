/** JSON text of a result: typed arrays as lists, and null for a number that is missing, for JSON knows no NaN. */
export function jsonText(value: unknown): string {
  return JSON.stringify(plain(value));
}

/** Only typed arrays need another form, and lists of numbers hold none: looking into each of their values, as a
 *  replacer of JSON.stringify does, would double the time of a large ranking. */
function plain(value: unknown): unknown {
  if (ArrayBuffer.isView(value)) return Array.from(value as unknown as ArrayLike<number>);
  if (Array.isArray(value)) return typeof value[0] === 'object' ? value.map(plain) : value;
  if (typeof value === 'object' && value !== null && Object.getPrototypeOf(value) === Object.prototype) {
    return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, plain(item)]));
  }
  return value;
}
