import { askDatabase } from '@/lib/store/health';

export const dynamic = 'force-dynamic';

/** 200 when the database answers, else 503: for whatever watches over the server. */
export async function GET(): Promise<Response> {
  try {
    await askDatabase();
    return Response.json({ status: 'ok' }, { headers: { 'Cache-Control': 'no-store' } });
  } catch {
    const problem = {
      type: 'about:blank',
      title: 'Service Unavailable',
      status: 503,
      detail: 'The database does not answer.',
    };
    return Response.json(problem, {
      status: 503,
      headers: { 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store' },
    });
  }
}
