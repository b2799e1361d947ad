import { recordParameters } from '../regions/[region]/records/parameters';
import { BASIS_PARAMETERS, queryParameters, REGION } from './parameters';
import { answers, anything, json, text } from './parts';

const underBasis = (summary: string, description: string) => ({
  get: {
    summary,
    parameters: [REGION, ...queryParameters(recordParameters), ...BASIS_PARAMETERS],
    responses: {
      ...answers(description, { ...json(anything), 'text/csv': { schema: text } }),
      '304': { description: 'unchanged since the entity tag of If-None-Match' },
    },
  },
});

/** What a region's records hold, and over which years they can be compared. */
export const RECORD_PATHS = {
  '/api/regions/{region}/records': underBasis(
    'All stations by all low-flow years: days with a value, missing, flagged; usable or why not',
    'a station’s years in columns, from its firstYear on; as CSV a row a year; with an ETag',
  ),
  '/api/regions/{region}/common-periods': underBasis(
    'How many stations would stay for every start and end year, at the basis’s completeness',
    'counts at (first − firstYear) × years + (last − firstYear); as CSV a row a period; with an ETag',
  ),
};
