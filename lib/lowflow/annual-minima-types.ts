/** Annual n-day minima of one station: one entry a low-flow year from its first to its last valued day. */
export interface AnnualMinima {
  /** low-flow years (calendar year in which each begins), consecutive and rising */
  years: Int32Array;
  /** 1 when the year may be used */
  usable: Uint8Array;
  missingDays: Int32Array;
  /** m³/s, rounded to 10 significant digits; NaN when the year has no complete n-day window */
  minimum: Float64Array;
  /** day number of the last day of the first window that attains the minimum; −1 when there is none */
  day: Int32Array;
  /** why a year is not usable, in words and figures; empty when usable */
  reason: string[];
  /** days in the year (or season) that carry any flag */
  flaggedDays: Int32Array;
  /** days with zero flow × days in year / days observed; NaN when nothing was observed */
  zeroDays: Float64Array;
  /** mean flow of the observed days, m³/s; NaN when nothing was observed */
  meanFlow: Float64Array;
}
