import type { SCHEMAS } from './schemas';

export type SchemaName = keyof typeof SCHEMAS;

export const reference = (name: SchemaName) => ({ $ref: `#/components/schemas/${name}` });
export const listOf = (name: SchemaName) => ({ type: 'array', items: reference(name) });
export const anything = { type: 'object' };
export const text = { type: 'string' };
export const json = (schema: object) => ({ 'application/json': { schema } });

/** What every operation answers when something is wrong. */
export const PROBLEM = {
  default: {
    description: 'what is wrong, and what would do',
    content: { 'application/problem+json': { schema: reference('Problem') } },
  },
};

/** What an operation answers when all is well. */
export function answers(description: string, content: object, status = '200') {
  return { [status]: { description, content }, ...PROBLEM };
}

/** Files in a form, and what is chosen about them. */
export const MULTIPART = {
  'multipart/form-data': {
    schema: {
      type: 'object',
      properties: {
        files: { type: 'array', items: { type: 'string', format: 'binary' } },
        choices: { type: 'string', description: 'JSON of the schema ImportChoices' },
      },
      required: ['files'],
    },
  },
};
