import { Readable } from 'node:stream';
import { attachment } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { regionArchive } from '@/lib/export/archive/region-archive';
import { archiveParameters } from './parameters';

/** The region as one archive of open formats, made while it is sent. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { waterml } = readParameters(request, archiveParameters);
  const region = await regionOf(params);
  const archive = await regionArchive(region, { withWaterml: waterml === 'yes', signal: request.signal });
  return new Response(Readable.toWeb(archive) as ReadableStream<Uint8Array>, {
    headers: {
      'content-type': 'application/zip',
      'cache-control': 'no-store',
      ...attachment(`${region.slug}.zip`),
    },
  });
});
