import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { Validator } from '@seriousme/openapi-schema-validator';
import { expect, test } from 'vitest';
import { openApiDocument } from '../../../app/api/openapi.json/document.ts';
import { GET } from '../../../app/api/openapi.json/route.ts';
import { BASIS_KEYS, basisFromQuery, DEFAULT_BASIS } from '../../../lib/basis.ts';
import { call } from './call.ts';

interface Operation {
  parameters?: { name: string; in: string; schema: { pattern?: string; enum?: unknown[] } }[];
}
const paths = openApiDocument().paths as Record<string, Record<string, Operation>>;

test('GET openapi.json answers a valid OpenAPI document', async () => {
  const document = await (await call(GET, '/api/openapi.json', {})).json();
  expect(await new Validator().validate(document)).toEqual({ valid: true });
  expect(document.openapi).toBe('3.1.0');
});

test('every route handler is described, with all of its methods, and nothing else is', () => {
  const root = join(process.cwd(), 'app');
  const found: string[] = [];
  for (const entry of readdirSync(root, { recursive: true, withFileTypes: true })) {
    if (entry.name !== 'route.ts') continue;
    const folder = `/${relative(root, entry.parentPath)}`;
    if (!folder.startsWith('/api/') && folder !== '/healthz') continue;
    const source = readFileSync(join(entry.parentPath, entry.name), 'utf8');
    const path = folder.replaceAll('[', '{').replaceAll(']', '}');
    for (const [, method] of source.matchAll(/export (?:const|async function) (GET|POST|PATCH|PUT|DELETE)\b/g)) {
      found.push(`${method} ${path}`);
    }
  }
  const described = Object.entries(paths).flatMap(([path, item]) =>
    Object.keys(item)
      .filter((key) => key !== 'parameters')
      .map((method) => `${method.toUpperCase()} ${path}`),
  );
  expect(described.sort()).toEqual(found.sort());
});

test('the ranking is described with every basis key', () => {
  const names = paths['/api/regions/{region}/ranking'].get.parameters!.map(({ name }) => name);
  expect(names).toEqual(expect.arrayContaining([...BASIS_KEYS, 'format', 'stations', 'in']));
});

test('what the described patterns of basis keys allow can be read as a basis', () => {
  const { parameters } = paths['/api/regions/{region}/ranking'].get;
  const examples = {
    period: ['common', 'own', '1985-2024'],
    yearStart: ['auto', '4', '12'],
    season: ['none', '5-9'],
    exclude: ['none', 'ice,suspect'],
  };
  for (const [name, texts] of Object.entries(examples)) {
    const pattern = new RegExp(parameters!.find((one) => one.name === name)!.schema.pattern!);
    for (const text of texts) {
      expect([name, text, pattern.test(text)]).toEqual([name, text, true]);
      expect(basisFromQuery({ [name]: text })).toHaveProperty('days', DEFAULT_BASIS.days);
    }
  }
});
