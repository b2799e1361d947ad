import type { NextRequest } from 'next/server';
import { outlineOf } from './outline.ts';

/** GET /map-outline?box=west,south,east,north: coast and borders of the bundled atlas, for maps without tiles. */
export async function GET(request: NextRequest): Promise<Response> {
  const text = request.nextUrl.searchParams.get('box') ?? '';
  const [west, south, east, north] = text.split(',').map(Number);
  const sound = [west, south, east, north].every(Number.isFinite) && west < east && south < north;
  if (!sound || west < -180 || east > 180 || south < -90 || north > 90) {
    return Response.json(
      {
        type: 'about:blank',
        title: 'Not a box',
        status: 400,
        detail: `box=${text} cannot be read; give west,south,east,north in degrees, for example box=10,45,15,48.`,
      },
      { status: 400, headers: { 'content-type': 'application/problem+json' } },
    );
  }
  return Response.json(await outlineOf([west, south, east, north]), {
    headers: { 'cache-control': 'private, max-age=86400' },
  });
}
