import { archiveParameters } from '../regions/[region]/archive/parameters';
import { queryParameters, REGION } from './parameters';
import { answers } from './parts';

/** A whole region in open formats. */
export const ARCHIVE_PATHS = {
  '/api/regions/{region}/archive': {
    get: {
      summary: 'The region as one archive of open formats; imported elsewhere it gives the same region',
      parameters: [REGION, ...queryParameters(archiveParameters)],
      responses: answers('a ZIP archive, made while it is sent', {
        'application/zip': { schema: { type: 'string', format: 'binary' } },
      }),
    },
  },
};
