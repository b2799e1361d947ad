/** Slopes are per year in calculation and per decade where they are read. */
export const YEARS_PER_DECADE = 10;
