/** Days to a page. A record is kept in pages, so that rows may come in any order, a stray date costs one page, and
 *  growing copies nothing. */
export const PAGE_BITS = 10;
export const PAGE = 1 << PAGE_BITS;
const MISSING = -0x80000000;

/** Days as they are written: a value and a code each. */
export interface OpenPage {
  values: Float64Array;
  codes: Uint8Array;
}

/** A page that has been left: whole numbers of 10^−decimals, four bytes a day, NaN as MISSING. */
export interface PackedPage {
  mantissas: Int32Array;
  decimals: number;
  /** one number when all days share a code */
  codes: Uint8Array | number;
}

export const emptyPage = (): OpenPage => ({ values: new Float64Array(PAGE), codes: new Uint8Array(PAGE) });

/** Flows have few decimals: as whole numbers of 10^−decimals they fit in four bytes. A whole number divided by an exact
 *  power of ten gives back the very double that reading the text gave.
 *  @returns null when some value does not fit */
export function pack(page: OpenPage): PackedPage | null {
  const mantissas = new Int32Array(PAGE);
  let decimals = 0;
  let scale = 1;
  for (let at = 0; at < PAGE; at++) {
    const value = page.values[at];
    if (Number.isNaN(value)) continue;
    while (Math.round(value * scale) / scale !== value) {
      if (++decimals > 9) return null;
      scale *= 10;
    }
  }
  for (let at = 0; at < PAGE; at++) {
    const value = page.values[at];
    const mantissa = Math.round(value * scale);
    if (Math.abs(mantissa) > 0x7fffffff || (value === 0 && Object.is(value, -0))) return null;
    if (!Number.isNaN(value) && mantissa / scale !== value) return null;
    mantissas[at] = Number.isNaN(value) ? MISSING : mantissa;
  }
  const first = page.codes[0];
  const alike = page.codes.every((code) => code === first);
  return { mantissas, decimals, codes: alike ? first : page.codes.slice() };
}

/** The inverse of pack. @returns `into`, overwritten */
export function unpack(packed: PackedPage, into: OpenPage): OpenPage {
  const scale = 10 ** packed.decimals;
  for (let at = 0; at < PAGE; at++) {
    const mantissa = packed.mantissas[at];
    into.values[at] = mantissa === MISSING ? Number.NaN : mantissa / scale;
  }
  if (typeof packed.codes === 'number') into.codes.fill(packed.codes);
  else into.codes.set(packed.codes);
  return into;
}
