import type * as z from 'zod';
import { pairParameters } from '../regions/[region]/stations/[code]/pair/parameters';
import { weatherParameters } from '../regions/[region]/stations/[code]/weather/parameters';
import { BASIS_PARAMETERS, queryParameters, REGION, STATION } from './parameters';
import { answers, anything, json, text } from './parts';

/** An answer about one station under a basis, with an entity tag. */
function ofStation(summary: string, shape: z.ZodRawShape, content: object) {
  return {
    get: {
      summary,
      parameters: [REGION, STATION, ...queryParameters(shape), ...BASIS_PARAMETERS],
      responses: {
        ...answers('the answer, with an ETag', content),
        '304': { description: 'unchanged since the entity tag of If-None-Match' },
      },
    },
  };
}

const TABLE = {
  ...json(anything),
  'text/csv': { schema: text },
  'application/geo+json': { schema: anything },
  'application/csvm+json': { schema: anything },
};

/** A station against reference stations, and against the weather. */
export const PAIR_PATHS = {
  '/api/regions/{region}/stations/{code}/pair': ofStation(
    'A station against reference stations: ratios, sums of the double-mass curve, trends',
    pairParameters,
    TABLE,
  ),
  '/api/regions/{region}/stations/{code}/references': ofStation(
    'Natural stations that may serve a station as references, best first',
    {},
    json(anything),
  ),
  '/api/regions/{region}/stations/{code}/weather': ofStation(
    'Trend of a station’s annual minima given the weather before each of them',
    weatherParameters,
    TABLE,
  ),
};
