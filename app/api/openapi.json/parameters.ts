import * as z from 'zod';
import { BASIS_KEYS, type BasisKey, basisSchema, EXCLUDABLE_FLAGS } from '@/lib/basis';

export interface Parameter {
  name: string;
  in: 'query' | 'path' | 'header';
  required: boolean;
  description?: string;
  schema: Record<string, unknown>;
}

/** Query parameters out of the zod shape by which a route reads them. */
export function queryParameters(shape: z.ZodRawShape): Parameter[] {
  const { properties = {}, required = [] } = z.toJSONSchema(z.object(shape), { io: 'input' });
  return Object.entries(properties).map(([name, property]) => {
    const { description, ...schema } = property as Record<string, unknown>;
    return {
      name,
      in: 'query',
      required: required.includes(name),
      ...(typeof description === 'string' ? { description } : {}),
      schema,
    };
  });
}

/** Basis keys whose text in a query is not their JSON: pairs are joined by a hyphen, lists by commas. */
const AS_TEXT: Partial<Record<BasisKey, { pattern: string; description: string }>> = {
  period: {
    pattern: '^(common|own|\\d{4}-\\d{4})$',
    description: 'common, own (each station’s own years) or first-last',
  },
  yearStart: { pattern: '^(auto|[1-9]|1[0-2])$', description: 'auto, or the month in which the low-flow year begins' },
  season: {
    pattern: '^(none|\\d{1,2}-\\d{1,2})$',
    description: 'none, or firstMonth-lastMonth inside one low-flow year',
  },
  exclude: {
    pattern: `^(none|(${EXCLUDABLE_FLAGS.join('|')})(,(${EXCLUDABLE_FLAGS.join('|')}))*)$`,
    description: 'flags whose days are treated as missing, with commas between; none for no flag',
  },
};

/** The basis as query parameters, each of which may be left out. */
export const BASIS_PARAMETERS: Parameter[] = BASIS_KEYS.map((name) => {
  const text = AS_TEXT[name];
  if (text) {
    return {
      name,
      in: 'query',
      required: false,
      description: text.description,
      schema: { type: 'string', pattern: text.pattern },
    };
  }
  const { default: _ofTheProgram, ...schema } = queryParameters({ [name]: basisSchema.shape[name] })[0].schema;
  return { name, in: 'query', required: false, schema };
});

const pathParameter = (name: string, description: string): Parameter => ({
  name,
  in: 'path',
  required: true,
  description,
  schema: { type: 'string' },
});

export const REGION = pathParameter('region', 'slug of the region’s name');
export const STATION = pathParameter('code', 'code of the station');
export const LAYER = pathParameter('layer', 'number of the layer');
export const IMPORT = pathParameter('import', 'number of the import');
export const JOB = pathParameter('job', 'id of the job');
export const UPLOAD = pathParameter('upload', 'id of the upload');
export const KEPT_MAPPING = pathParameter('mapping', 'number of the kept mapping');
export const MARK = pathParameter('mark', 'number of the mark');
export const LINK = pathParameter('link', 'number of the link');
