import { daysParameters } from '../regions/[region]/stations/[code]/days/parameters';
import { queryParameters, REGION, STATION } from './parameters';

/** Days of a station, one by one. */
export const DAY_PATHS = {
  '/api/regions/{region}/stations/{code}/days': {
    get: {
      summary: 'Days of a station: values, flags, quality codes as written',
      parameters: [REGION, STATION, ...queryParameters(daysParameters)],
      responses: {
        '200': {
          description: 'the days that lie inside the record, in columns, with an ETag',
          content: {
            'application/json': {
              schema: {
                type: 'object',
                properties: {
                  station_code: { type: 'string' },
                  quantity: { type: 'string' },
                  unit: { type: 'string' },
                  dates: { type: 'array', items: { type: 'string', format: 'date' } },
                  values: { type: 'array', items: { type: ['number', 'null'] } },
                  flags: {
                    type: 'array',
                    items: { type: 'integer' },
                    description:
                      'bits: 1 estimated, 2 provisional, 4 ice, 8 below detection, 16 suspect, 32 rejected by a person',
                  },
                  texts: { type: 'array', items: { type: 'string' } },
                },
              },
            },
            'text/csv': { schema: { type: 'string' } },
          },
        },
        '304': { description: 'unchanged since the entity tag of If-None-Match' },
        default: {
          description: 'what is wrong, and what would do',
          content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
        },
      },
    },
  },
};
