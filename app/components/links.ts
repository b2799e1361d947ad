/** Addresses of the pages of a region, with the state that goes along from page to page. */

/** The basis keys as they stand in a URL. Listed here so that links need not load the whole schema;
 *  test/unit/app/links.test.ts holds them equal to lib/basis.ts. */
export const BASIS_PARAMETERS = [
  'period',
  'yearStart',
  'season',
  'days',
  'maxMissingDays',
  'exclude',
  'minYears',
  'minCoverage',
  'normalise',
  'rankBy',
  'trendTest',
  'serialCorrection',
  'alpha',
  'units',
  'index',
] as const;

/** View state of the map screen that links to and from other pages keep. */
const MAP_PARAMETERS = ['view', 'station', 'follow', 'tab', 'q', 'split', 'k', 'fill'] as const;

export type RegionPage = 'map' | 'evidence' | 'curves' | 'records' | 'import';

/** What a link carries on: the basis and the map's view, and nothing that belongs to one page only. */
export function carried(query: URLSearchParams | string): URLSearchParams {
  const from = new URLSearchParams(query);
  const out = new URLSearchParams();
  for (const key of [...BASIS_PARAMETERS, ...MAP_PARAMETERS]) {
    const value = from.get(key);
    if (value !== null) out.set(key, value);
  }
  return out;
}

const withQuery = (path: string, query: URLSearchParams): string => {
  // a comma may stand as it is in a query, and links are read by people
  const text = query.toString().replaceAll('%2C', ',');
  return text ? `${path}?${text}` : path;
};

/** Example: ('kestrane-basin', 'curves', 'days=30') → "/regions/kestrane-basin/curves?days=30" */
export function regionHref(slug: string, page: RegionPage, query: URLSearchParams | string = ''): string {
  const path = `/regions/${encodeURIComponent(slug)}${page === 'map' ? '' : `/${page}`}`;
  return withQuery(path, carried(query));
}

/** The page of one station. */
export function stationHref(slug: string, code: string, query: URLSearchParams | string = ''): string {
  return withQuery(`/regions/${encodeURIComponent(slug)}/stations/${encodeURIComponent(code)}`, carried(query));
}

/** The Records page with one year of one station open. */
export function yearHref(slug: string, station: string, year: number, query: URLSearchParams | string = ''): string {
  const next = carried(query);
  next.set('station', station);
  next.set('year', String(year));
  return withQuery(`/regions/${encodeURIComponent(slug)}/records`, next);
}

/** The Records page at one finding in the list of all.
 *  @param finding  its id */
export function findingHref(
  slug: string,
  { code, id }: { code: string; id: string },
  query: URLSearchParams | string = '',
): string {
  const next = carried(query);
  next.set('show', 'findings');
  next.set('station', code);
  next.set('finding', id);
  return withQuery(`/regions/${encodeURIComponent(slug)}/records`, next);
}

/** The page on which a station's facts are changed. */
export function stationEditHref(slug: string, code: string, query: URLSearchParams | string = ''): string {
  const path = `/regions/${encodeURIComponent(slug)}/stations/${encodeURIComponent(code)}/edit`;
  return withQuery(path, carried(query));
}

/** The page of the upstream–downstream links of a region. */
export function linksHref(slug: string, query: URLSearchParams | string = ''): string {
  return withQuery(`/regions/${encodeURIComponent(slug)}/links`, carried(query));
}

/** The page on which a station is derived from others.
 *  @param from  code of a station that the recipe begins with */
export function deriveHref(slug: string, from: string | null, query: URLSearchParams | string = ''): string {
  const out = carried(query);
  if (from !== null) out.set('from', from);
  return withQuery(`/regions/${encodeURIComponent(slug)}/derive`, out);
}

/** The page on which a station is compared with reference stations.
 *  @param references  their codes; none: those that the page begins with */
export function pairHref(
  slug: string,
  station: string | null,
  query: URLSearchParams | string = '',
  references: readonly string[] = [],
): string {
  const out = carried(query);
  out.delete('station');
  if (station !== null) out.set('station', station);
  if (references.length > 0) out.set('with', references.map(encodeURIComponent).join(','));
  return withQuery(`/regions/${encodeURIComponent(slug)}/pair`, out);
}

/** The address of an API table with only the basis along. */
export function apiHref(slug: string, table: string, query: URLSearchParams | string, format?: string): string {
  const from = new URLSearchParams(query);
  const out = new URLSearchParams();
  for (const key of BASIS_PARAMETERS) {
    const value = from.get(key);
    if (value !== null) out.set(key, value);
  }
  if (format) out.set('format', format);
  return withQuery(`/api/regions/${encodeURIComponent(slug)}/${table}`, out);
}
