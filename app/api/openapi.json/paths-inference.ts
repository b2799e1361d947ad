import type * as z from 'zod';
import { longTableParameters } from '../_http/long-table';
import { plainFormatParameter } from '../_http/plain-table';
import { breaksParameters } from '../regions/[region]/breaks/parameters';
import { certaintyParameters } from '../regions/[region]/certainty/parameters';
import { movementParameters } from '../regions/[region]/movement/parameters';
import { regionalParameters } from '../regions/[region]/regional/parameters';
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
function longTable(summary: string, path: Parameter[], shape: z.ZodRawShape) {
  const { get } = plainTable(summary, path, shape);
  const running = { description: 'the job that works on it: ask again when it is done', content: json(anything) };
  return { get: { ...get, responses: { ...get.responses, '202': running } } };
}

/** How sure the ranking is, what the stations say together, how answers depend on the years and the other terms, and levels
 *  before and after. */
export const INFERENCE_PATHS = {
  '/api/regions/{region}/certainty': longTable(
    'How sure each place in the ranking is, and which trend each record could have shown',
    [REGION],
    certaintyParameters,
  ),
  '/api/regions/{region}/regional': longTable(
    'How many stations fall and rise beyond chance, and whether they share one trend: all, by influence, in an area, each with the independent set',
    [REGION],
    regionalParameters,
  ),
  '/api/regions/{region}/stations/{code}/start-end': plainTable(
    'Trend of a station for every start year and end year',
    [REGION, STATION],
    plainFormatParameter,
  ),
  '/api/regions/{region}/start-end': longTable(
    'How many stations fall, for every start year and end year',
    [REGION],
    longTableParameters,
  ),
  '/api/regions/{region}/movement': plainTable(
    'Who moved in the ranking, and how far, against other terms',
    [REGION],
    movementParameters,
  ),
  '/api/regions/{region}/alternatives': longTable(
    'The ranking under other choices of each term',
    [REGION],
    longTableParameters,
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
