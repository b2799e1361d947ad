import * as z from 'zod';
import { PROGRAM_VERSION } from '@/lib/export/program-version';
import { PATHS } from './paths';
import { SCHEMAS } from './schemas';

/** The API as an OpenAPI 3.1 document, made from the schemas by which requests are read. */
export function openApiDocument(): Record<string, unknown> {
  return {
    openapi: '3.1.0',
    info: {
      title: 'Hungerstone',
      version: PROGRAM_VERSION,
      description:
        'Which rivers of a region are losing their low flows, how fast and how surely. Stored and answered values are metric. ' +
        'Basis keys left out of a query are those of the region. Errors are RFC 9457 problem documents.',
      license: { name: 'MIT', identifier: 'MIT' },
    },
    servers: [{ url: '/' }],
    paths: PATHS,
    components: {
      schemas: Object.fromEntries(Object.entries(SCHEMAS).map(([name, schema]) => [name, jsonSchemaOf(schema)])),
    },
  };
}

/** A zod schema as JSON Schema, without the dialect's address: OpenAPI 3.1 has it as its own. */
function jsonSchemaOf(schema: z.ZodType): Record<string, unknown> {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' });
  return rest;
}
