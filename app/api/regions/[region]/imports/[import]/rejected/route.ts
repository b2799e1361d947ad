import { createReadStream, existsSync } from 'node:fs';
import { Readable } from 'node:stream';
import { attachment } from '@/app/api/_http/answer';
import { importOf } from '@/app/api/_http/import';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { rejectedFileOf, rejectedPath } from '@/lib/jobs/rejected-rows';

/** Every row of a file that was not taken: its number, its text and the reason. */
export const GET = route<{ region: string; import: string }>(async (_request, params) => {
  const region = await regionOf(params);
  const { id, report } = await importOf(region, params);
  const name = rejectedFileOf(report);
  if (name === null || !existsSync(rejectedPath(name))) {
    throw new Problem('not-found', `Import ${id} has no rejected rows.`);
  }
  const body = Readable.toWeb(createReadStream(rejectedPath(name))) as ReadableStream<Uint8Array>;
  return new Response(body, {
    headers: {
      'content-type': 'text/csv; charset=utf-8; header=present',
      'cache-control': 'no-store',
      ...attachment(`${region.slug}-import-${id}-rejected.csv`),
    },
  });
});
