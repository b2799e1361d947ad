import type * as z from 'zod';
import { formatParameter, tableParameters } from '../_http/table';
import { curveParameters } from '../regions/[region]/curves/parameters';
import { rankingParameters } from '../regions/[region]/ranking/parameters';
import { coverageParameters } from '../regions/[region]/stations/[code]/coverage/parameters';
import { stationCurveParameters } from '../regions/[region]/stations/[code]/curve/parameters';
import { stationParameters } from '../regions/[region]/stations/parameters';
import { BASIS_PARAMETERS, IMPORT, JOB, LAYER, type Parameter, queryParameters, REGION, STATION } from './parameters';
import { answers, anything, json, listOf, MULTIPART, PROBLEM, reference, text } from './parts';
import { ARCHIVE_PATHS } from './paths-archive';
import { CHECK_PATHS } from './paths-checks';
import { DAY_PATHS } from './paths-days';
import { INFERENCE_PATHS } from './paths-inference';
import { KEPT_PATHS } from './paths-mappings';
import { PAIR_PATHS } from './paths-pair';
import { RECORD_PATHS } from './paths-records';
import { STATION_CHANGES, STATION_PATHS } from './paths-stations';
import { UPLOAD_PATHS } from './paths-uploads';

const TABLE = {
  'application/json': { schema: anything },
  'text/csv': { schema: text },
  'application/geo+json': { schema: anything },
  'application/csvm+json': { schema: anything },
};

/** A table under a basis, with an entity tag. */
function table(summary: string, path: Parameter[], shape: z.ZodRawShape, content: object = TABLE) {
  return {
    get: {
      summary,
      parameters: [...path, ...queryParameters(shape), ...BASIS_PARAMETERS],
      responses: {
        ...answers('the table, with an ETag', content),
        '304': { description: 'unchanged since the entity tag of If-None-Match' },
      },
    },
  };
}

export const PATHS = {
  '/api/regions': {
    get: { summary: 'All regions', responses: answers('the regions', json(listOf('RegionSummary'))) },
    post: {
      summary: 'Make an empty region',
      requestBody: { required: true, content: json(reference('NewRegion')) },
      responses: answers('the region', json(reference('Region')), '201'),
    },
  },
  '/api/regions/{region}': {
    parameters: [REGION],
    get: { summary: 'A region', responses: answers('the region', json(reference('Region'))) },
    patch: {
      summary: 'Change a region’s name, map background or own basis',
      requestBody: { required: true, content: json(reference('RegionChange')) },
      responses: answers('the region', json(reference('Region'))),
    },
    delete: { summary: 'Take a region away', responses: { '204': { description: 'it is gone' }, ...PROBLEM } },
  },
  '/api/regions/{region}/stations': {
    get: {
      summary: 'Stations',
      parameters: [REGION, ...queryParameters(stationParameters)],
      responses: answers('the stations, as GeoJSON unless asked otherwise', {
        'application/geo+json': { schema: anything },
        'application/json': { schema: listOf('Station') },
        'text/csv': { schema: text },
      }),
    },
    post: { ...STATION_CHANGES.add, parameters: [REGION] },
  },
  '/api/regions/{region}/ranking': table(
    'Stations in order of trend in annual minima, or in the basis’s other index',
    [REGION],
    rankingParameters,
  ),
  '/api/regions/{region}/minima': table('Annual minima', [REGION], tableParameters),
  '/api/regions/{region}/curves': table('Flow-duration curves', [REGION], curveParameters),
  '/api/regions/{region}/stations/{code}': {
    ...table('A station against its region', [REGION, STATION], {}, json(anything)),
    patch: { ...STATION_CHANGES.patch, parameters: [REGION, STATION, ...STATION_CHANGES.patch.parameters] },
    delete: { ...STATION_CHANGES.delete, parameters: [REGION, STATION] },
  },
  '/api/regions/{region}/stations/{code}/minima': table(
    'Annual minima of a station',
    [REGION, STATION],
    formatParameter,
  ),
  '/api/regions/{region}/stations/{code}/curve': table(
    'Flow-duration curve of a station',
    [REGION, STATION],
    stationCurveParameters,
  ),
  '/api/regions/{region}/stations/{code}/coverage': table(
    'How complete a record is, year by year',
    [REGION, STATION],
    coverageParameters,
    { ...json(anything), 'text/csv': { schema: text } },
  ),
  ...CHECK_PATHS,
  ...DAY_PATHS,
  ...INFERENCE_PATHS,
  ...PAIR_PATHS,
  ...RECORD_PATHS,
  ...STATION_PATHS,
  '/api/regions/{region}/layers': {
    get: { summary: 'Map layers', parameters: [REGION], responses: answers('the layers', json(listOf('Layer'))) },
  },
  '/api/regions/{region}/layers/{layer}': {
    get: {
      summary: 'A map layer',
      parameters: [REGION, LAYER],
      responses: answers('GeoJSON', { 'application/geo+json': { schema: anything } }),
    },
  },
  '/api/regions/{region}/imports': {
    parameters: [REGION],
    get: {
      summary: 'What was imported',
      responses: answers('imports, newest first', json({ type: 'array', items: anything })),
    },
    post: {
      summary: 'Import files: registries, layers and flows, in any order',
      requestBody: { required: true, content: MULTIPART },
      responses: answers('the job that imports them', json(reference('Job')), '202'),
    },
  },
  '/api/regions/{region}/imports/{import}': {
    parameters: [REGION, IMPORT],
    get: { summary: 'The report of an import', responses: answers('report and mapping', json(anything)) },
    delete: {
      summary: 'Undo an import',
      responses: { '204': { description: 'it is undone' }, ...PROBLEM },
    },
  },
  '/api/regions/{region}/imports/{import}/rejected': {
    get: {
      summary: 'Every rejected row of an import',
      parameters: [REGION, IMPORT],
      responses: answers('row, text, reason', { 'text/csv': { schema: text } }),
    },
  },
  ...KEPT_PATHS,
  ...UPLOAD_PATHS,
  ...ARCHIVE_PATHS,
  '/api/jobs/{job}': {
    parameters: [JOB],
    get: { summary: 'A job', responses: answers('where it stands', json(reference('Job'))) },
    delete: { summary: 'Cancel a job', responses: answers('how it ended', json(reference('Job'))) },
  },
  '/api/jobs/{job}/events': {
    get: {
      summary: 'A job’s states as they come',
      parameters: [JOB, { name: 'Last-Event-ID', in: 'header', required: false, schema: { type: 'integer' } }],
      responses: answers('events named job, each a Job', { 'text/event-stream': { schema: text } }),
    },
  },
  '/api/openapi.json': {
    get: { summary: 'This description', responses: answers('OpenAPI 3.1', json(anything)) },
  },
  '/healthz': {
    get: {
      summary: 'Whether the database answers',
      responses: { '200': { description: 'it does' }, '503': { description: 'it does not' } },
    },
  },
};
