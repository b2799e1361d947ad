import { DAILY_DISCHARGE } from '../units.ts';

/** Where an agency's tab-delimited table has its columns. */
export interface AgencyColumns {
  station: number;
  date: number;
  value: number;
  flag: number;
  candidates: number[];
}

const SERIES = /_(\d{5}(?:_\d{5})?)$/;

/** Parameter and statistic in the heading of a series, "00060_00003"; null for other headings. */
export function seriesOf(heading: string): string | null {
  return SERIES.exec(heading.trim().toLowerCase())?.[1] ?? null;
}

/** Columns of a header such as `agency_cd site_no datetime 159456_00060_00003 159456_00060_00003_cd`: each series has a
 *  column of its own and one of its qualifiers behind it. The value is the one daily mean discharge; where there is
 *  none, or are several, −1 and the candidates.
 *  @param wanted  parameter and statistic of the series that is read instead of the daily mean discharge
 *  @returns null when the header is of another kind */
export function agencyColumns(header: readonly string[], wanted: string | null = null): AgencyColumns | null {
  const names = header.map((name) => name.trim().toLowerCase());
  const station = names.indexOf('site_no');
  const date = names.findIndex((name) => name === 'datetime' || name === 'date');
  const candidates = names.flatMap((name, at) => (SERIES.test(name) ? [at] : []));
  if (station < 0 || date < 0 || candidates.length === 0) return null;
  const fits = (name: string) => (wanted === null ? DAILY_DISCHARGE.test(name) : seriesOf(name) === wanted);
  const means = candidates.filter((at) => fits(names[at]));
  const value = means.length === 1 ? means[0] : -1;
  return { station, date, value, flag: value < 0 ? -1 : names.indexOf(`${names[value]}_cd`), candidates };
}
