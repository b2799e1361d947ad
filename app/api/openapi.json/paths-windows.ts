import type * as z from 'zod';
import { plainFormatParameter } from '../_http/plain-table';
import { alternativesParameters } from '../regions/[region]/alternatives/parameters';
import { breaksParameters } from '../regions/[region]/breaks/parameters';
import { movementParameters } from '../regions/[region]/movement/parameters';
import { startEndParameters } from '../regions/[region]/start-end/parameters';
import { BASIS_PARAMETERS, type Parameter, queryParameters, REGION, STATION } from './parameters';
import { answers, anything, json, text } from './parts';

/** A table under a basis whose rows are no places. */
function plainTable(summary: string, path: Parameter[], shape: z.ZodRawShape, content: object = json(anything)) {
  return {
    get: {
      summary,
      parameters: [...path, ...queryParameters(shape), ...BASIS_PARAMETERS],
      responses: {
        ...answers('the table, with an ETag', {
          ...content,
          'text/csv': { schema: text },
          'application/csvm+json': { schema: anything },
        }),
        '304': { description: 'unchanged since the entity tag of If-None-Match' },
      },
    },
  };
}

/** Such a table that may take long. */
export function longTable(summary: string, path: Parameter[], shape: z.ZodRawShape) {
  const { get } = plainTable(summary, path, shape);
  const running = { description: 'the job that works on it: ask again when it is done', content: json(anything) };
  return { get: { ...get, responses: { ...get.responses, '202': running } } };
}

/** How answers depend on the years and the other terms, and levels before and after. */
export const WINDOW_PATHS = {
  '/api/regions/{region}/stations/{code}/start-end': plainTable(
    'Trend of a station for every start year and end year',
    [REGION, STATION],
    plainFormatParameter,
  ),
  '/api/regions/{region}/start-end': longTable(
    'How many stations fall, for every start year and end year',
    [REGION],
    startEndParameters,
  ),
  '/api/regions/{region}/movement': plainTable(
    'Who moved in the ranking, and how far, against other terms',
    [REGION],
    movementParameters,
  ),
  '/api/regions/{region}/alternatives': longTable(
    'The ranking under other choices of each term',
    [REGION],
    alternativesParameters,
  ),
  '/api/regions/{region}/breaks': plainTable(
    'Levels before and after a break at the ranked stations',
    [REGION],
    breaksParameters,
  ),
  '/api/regions/{region}/stations/{code}/breaks': plainTable(
    'Levels of a station before and after breaks, and the change that its figures suggest',
    [REGION, STATION],
    breaksParameters,
  ),
};
