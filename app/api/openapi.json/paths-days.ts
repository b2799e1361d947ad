import { daysParameters } from '../regions/[region]/stations/[code]/days/parameters';
import { queryParameters, REGION, STATION } from './parameters';
import { answers, json, text } from './parts';

const listOf = (items: object, description = '') => ({
  type: 'array',
  items,
  ...(description ? { description } : {}),
});

/** Days of a station, one by one, in columns. */
export const DAY_PATHS = {
  '/api/regions/{region}/stations/{code}/days': {
    get: {
      summary: 'Days of a station: values, flags, quality codes as written',
      parameters: [REGION, STATION, ...queryParameters(daysParameters)],
      responses: {
        ...answers('the days that lie inside the record, in columns, with an ETag', {
          ...json({
            type: 'object',
            properties: {
              station_code: text,
              quantity: text,
              unit: text,
              dates: listOf({ type: 'string', format: 'date' }),
              values: listOf({ type: ['number', 'null'] }, 'in the unit; null where missing'),
              flags: listOf(
                { type: 'integer' },
                'bits: 1 estimated, 2 provisional, 4 ice, 8 below detection, 16 suspect, 32 rejected by a person',
              ),
              texts: listOf(text, 'the quality code that the file wrote; empty for none'),
            },
          }),
          'text/csv': { schema: text },
        }),
        '304': { description: 'unchanged since the entity tag of If-None-Match' },
      },
    },
  },
};
