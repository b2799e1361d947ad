import { findingParameters } from '../regions/[region]/findings/parameters';
import { markParameters } from '../regions/[region]/stations/[code]/marks/bodies';
import { MARK, queryParameters, REGION, STATION } from './parameters';
import { answers, json, listOf, PROBLEM, reference, text } from './parts';

const csv = { 'text/csv': { schema: text } };

/** What the checks found, and how people answer it. */
export const CHECK_PATHS = {
  '/api/regions/{region}/findings': {
    get: {
      summary: 'What the checks found on the records, by station and day',
      parameters: [REGION, ...queryParameters(findingParameters)],
      responses: answers('the findings', {
        ...json({ type: 'object', properties: { findings: listOf('Finding') } }),
        ...csv,
      }),
    },
  },
  '/api/regions/{region}/findings/stations': {
    get: {
      summary: 'How many findings of which kind and state each station has; those without one are left out',
      parameters: [REGION],
      responses: answers('the counts by station', {
        ...json({ type: 'object', properties: { stations: listOf('FindingCounts') } }),
      }),
    },
  },
  '/api/regions/{region}/checks': {
    parameters: [REGION],
    post: {
      summary: 'Check records anew',
      requestBody: { required: false, content: json(reference('CheckOrder')) },
      responses: answers('the job that checks them', json(reference('Job')), '202'),
    },
  },
  '/api/regions/{region}/stations/{code}/marks': {
    parameters: [REGION, STATION],
    get: {
      summary: 'Marks that people laid on a record, in the order in which they hold',
      parameters: queryParameters(markParameters),
      responses: answers('the marks', { ...json({ type: 'object', properties: { marks: listOf('Mark') } }), ...csv }),
    },
    post: {
      summary: 'Reject, accept or note a stretch of days, or several, all of them or none; nothing is deleted',
      requestBody: { required: true, content: json(reference('NewMark')) },
      responses: answers(
        'the mark; where stretches were given, an object with the marks',
        json({ anyOf: [reference('Mark'), { type: 'object', properties: { marks: listOf('Mark') } }] }),
        '201',
      ),
    },
  },
  '/api/regions/{region}/stations/{code}/marks/{mark}': {
    parameters: [REGION, STATION, MARK],
    delete: { summary: 'Take a mark away', responses: { '204': { description: 'it is gone' }, ...PROBLEM } },
  },
};
