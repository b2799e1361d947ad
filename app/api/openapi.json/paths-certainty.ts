import { certaintyParameters } from '../regions/[region]/certainty/parameters';
import { REGION } from './parameters';
import { longTable } from './paths-windows';

/** How sure the order of the ranking is. */
export const CERTAINTY_PATHS = {
  '/api/regions/{region}/certainty': longTable(
    'How sure each place in the ranking is, and which trend each record could have shown',
    [REGION],
    certaintyParameters,
  ),
};
