import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { expandArchives } from '../../../lib/intake/archive/index.ts';
import { readFlows } from '../../../lib/intake/read-flows.ts';
import { readLayer } from '../../../lib/intake/read-layer.ts';
import { readRegistry } from '../../../lib/intake/read-registry.ts';
import type { Mapping } from '../../../lib/intake/types.ts';
import type { GivenFile } from '../../../lib/jobs/import-types.ts';
import { kindOf } from '../../../lib/jobs/stage-file.ts';

/** More than any of the files here unpacks to. */
const MOST_BYTES = 50e6;

/** Reads a file, or the files in it, the way an import does up to storing.
 *  @param folder  for what is unpacked; it is gone afterwards
 *  @returns stations, shapes and days taken, and days of rows that were rejected
 *  @throws IntakeError for what cannot be taken */
export async function readAsImportsDo(
  file: GivenFile,
  folder: string,
  mapping: Partial<Mapping> = {},
): Promise<number> {
  const unpacked = join(folder, 'unpacked');
  try {
    const { files } = await expandArchives([file], unpacked, { mostBytes: MOST_BYTES });
    let taken = 0;
    for (const one of files) taken += await readOne(one, mapping);
    return taken;
  } finally {
    await rm(unpacked, { recursive: true, force: true });
  }
}

async function readOne(file: GivenFile, mapping: Partial<Mapping>): Promise<number> {
  const kind = await kindOf(file, {});
  if (kind === 'registry') return (await readRegistry(file.path, file.name)).stations.length;
  if (kind === 'layer') return (await readLayer(file.path, file.name)).features;
  let days = 0;
  const report = await readFlows(file.path, {
    fileName: file.name,
    mapping: { ...mapping, dailyMean: 0.8 },
    unit: 'm3/s',
    emit: (part) => {
      days += part.values.length;
    },
  });
  return days + report.rejectedTotal;
}
