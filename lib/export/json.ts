/** JSON text of a result: typed arrays as lists, and null for a number that is missing, for JSON knows no NaN. */
export function jsonText(value: unknown, indent?: number): string {
  return JSON.stringify(
    value,
    (_key, item: unknown) => (ArrayBuffer.isView(item) ? Array.from(item as unknown as ArrayLike<number>) : item),
    indent,
  );
}
