/** An object of a JSON text whose shape is not known yet. */
export type JsonObject = Record<string, unknown>;

export const isJsonObject = (value: unknown): value is JsonObject =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** A value as JSON; one nested too deep to be written is named as such. */
export function jsonOrDeep(value: unknown): string {
  try {
    return String(JSON.stringify(value));
  } catch (cause) {
    if (!(cause instanceof RangeError)) throw cause;
    return 'nested too deep';
  }
}
