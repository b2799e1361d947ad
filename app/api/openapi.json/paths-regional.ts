import { regionalParameters } from '../regions/[region]/regional/parameters';
import { REGION } from './parameters';
import { longTable } from './paths-windows';

/** What the stations of a region say together. */
export const REGIONAL_PATHS = {
  '/api/regions/{region}/regional': longTable(
    'How many stations fall and rise beyond chance, and whether they share one trend: all, by influence, in an area, each with the independent set',
    [REGION],
    regionalParameters,
  ),
};
