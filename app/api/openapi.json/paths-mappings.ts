import { KEPT_MAPPING, LINK, REGION } from './parameters';
import { answers, json, listOf, PROBLEM, reference } from './parts';

/** What a region keeps beside its records: mappings to use again, and which station lies below which. */
export const KEPT_PATHS = {
  '/api/regions/{region}/mappings': {
    parameters: [REGION],
    get: { summary: 'Mappings kept to use again', responses: answers('by name', json(listOf('SavedMapping'))) },
    post: {
      summary: 'Keep a mapping; one of the same name is replaced',
      requestBody: { required: true, content: json(reference('MappingToKeep')) },
      responses: answers('the mapping', json(reference('SavedMapping')), '201'),
    },
  },
  '/api/regions/{region}/mappings/{mapping}': {
    parameters: [REGION, KEPT_MAPPING],
    delete: { summary: 'Take a kept mapping away', responses: { '204': { description: 'it is gone' }, ...PROBLEM } },
  },
  '/api/regions/{region}/links': {
    parameters: [REGION],
    get: { summary: 'Which station lies below which', responses: answers('the links', json(listOf('Link'))) },
    post: {
      summary: 'Say that one station lies below another, or that of several pairs, all of them or none',
      requestBody: { required: true, content: json(reference('NewLink')) },
      responses: answers(
        'the link; where links were given, an object with them',
        json({ anyOf: [reference('Link'), { type: 'object', properties: { links: listOf('Link') } }] }),
        '201',
      ),
    },
  },
  '/api/regions/{region}/links/{link}': {
    parameters: [REGION, LINK],
    delete: {
      summary: 'Take a link between two stations away',
      responses: { '204': { description: 'it is gone' }, ...PROBLEM },
    },
  },
};
