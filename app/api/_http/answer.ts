import { jsonText } from '@/lib/export/json';

const TYPES = {
  json: 'application/json',
  geojson: 'application/geo+json',
  csv: 'text/csv; charset=utf-8; header=present',
  metadata: 'application/csvm+json',
} as const;
export type AnswerType = keyof typeof TYPES;

/** Answers a product under an entity tag; a client that has it already gets 304 and nothing more.
 *  @param tag   equal exactly when the product is equal
 *  @param make  called only when the product is wanted */
export function taggedAnswer(
  request: Request,
  { tag, type, headers = {} }: { tag: string; type: AnswerType; headers?: Record<string, string> },
  make: () => string,
): Response {
  const etag = `"${tag}"`;
  const always = { etag, 'cache-control': 'private, no-cache' };
  if (matches(request.headers.get('if-none-match'), etag)) return new Response(null, { status: 304, headers: always });
  return new Response(make(), { headers: { ...always, 'content-type': TYPES[type], ...headers } });
}

/** If-None-Match compares weakly (RFC 9110, 13.1.2). */
function matches(header: string | null, etag: string): boolean {
  if (header === null) return false;
  return header.split(',').some((tag) => ['*', etag].includes(tag.trim().replace(/^W\//, '')));
}

/** Content-Disposition by RFC 6266: the plain name for old clients, the exact one in UTF-8. */
export function attachment(file: string): { 'content-disposition': string } {
  const plain = file.replace(/[^\w.-]/g, '_');
  return { 'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(file)}` };
}

/** An answer that is never kept: lists and jobs. */
export function jsonAnswer(value: unknown, init: { status?: number; headers?: Record<string, string> } = {}): Response {
  return new Response(jsonText(value), {
    status: init.status,
    headers: { 'content-type': TYPES.json, 'cache-control': 'no-store', ...init.headers },
  });
}

/** A table that is never kept, as a file to be saved. */
export function csvAnswer(text: string, headers: Record<string, string>): Response {
  return new Response(text, { headers: { 'content-type': TYPES.csv, 'cache-control': 'no-store', ...headers } });
}
