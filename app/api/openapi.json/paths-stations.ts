import { REGION, STATION } from './parameters';
import { answers, json, PROBLEM, reference } from './parts';

/** Methods that change a station; those that read it stand with the tables. */
export const STATION_CHANGES = {
  add: {
    summary: 'Add a station by hand: without days as yet, or derived from others',
    requestBody: { required: true, content: json(reference('NewStation')) },
    responses: answers('the station, with the ETag of its facts', json(reference('StationFacts')), '201'),
  },
  patch: {
    summary: 'Change what is known of a station',
    parameters: [
      {
        name: 'If-Match',
        in: 'header',
        required: false,
        description:
          'entity tag of the facts as they were read: the change is refused (412) when they are others by now',
        schema: { type: 'string' },
      },
    ],
    requestBody: { required: true, content: json(reference('StationChange')) },
    responses: answers('the station, with the ETag of its facts', json(reference('StationFacts'))),
  },
  delete: {
    summary: 'Take away a station without imported days, such as a derived one',
    responses: { '204': { description: 'it is gone' }, ...PROBLEM },
  },
};

export const STATION_PATHS = {
  '/api/regions/{region}/stations/{code}/facts': {
    get: {
      summary: 'What is known of a station: facts, dated changes, named flows, notes, recipe',
      parameters: [REGION, STATION],
      responses: answers('the facts, with their ETag', json(reference('StationFacts'))),
    },
  },
  '/api/regions/{region}/links/suggested': {
    parameters: [REGION],
    get: {
      summary: 'Links suggested from the river layers, or from areas and places',
      responses: answers('suggestions with their reasons, and rejected pairs', json(reference('LinkSuggestions'))),
    },
    post: {
      summary: 'Reject a suggested link, or let it be suggested again',
      requestBody: { required: true, content: json(reference('SuggestionAnswer')) },
      responses: answers('what was said', json(reference('SuggestionAnswer'))),
    },
  },
};
