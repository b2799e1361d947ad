import { jsonAnswer } from '@/app/api/_http/answer';
import { readJson, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { parseMapping } from '@/lib/intake/mapping';
import { listMappings, saveMapping } from '@/lib/store/saved-mappings';
import { mappingToKeep } from './bodies';

type Params = { region: string };

/** The mappings kept in a region, by name. */
export const GET = route<Params>(async (request, params) => {
  readParameters(request, {});
  return jsonAnswer(await listMappings((await regionOf(params)).id));
});

/** Keeps a mapping to use again; one of the same name is replaced. */
export const POST = route<Params>(async (request, params) => {
  const region = await regionOf(params);
  const { name, mapping } = await readJson(request, mappingToKeep);
  return jsonAnswer(await saveMapping(region.id, { name, mapping: parseMapping(mapping, name) }), { status: 201 });
});
