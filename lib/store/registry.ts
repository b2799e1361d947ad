import { randomUUID } from 'node:crypto';
import { type Applied, applyStaging } from './apply-staging.ts';
import { createStaging } from './staging.ts';
import type { FactName, StationInput } from './station-facts.ts';

export interface RegistrySource {
  fileName: string;
  sha256?: string;
  by?: string;
  /** the facts the registry speaks of; the others stay as they are. By default every fact that a station's entry holds */
  given?: readonly FactName[];
}

/** Makes stations, or corrects them, by code, as an import that can be undone. Naming a registry again changes nothing. */
export async function upsertRegistry(
  regionId: number,
  stations: readonly StationInput[],
  { fileName, sha256 = '', by, given }: RegistrySource = { fileName: 'stations' },
): Promise<Applied> {
  const staging = createStaging(`registry-${randomUUID()}`);
  try {
    const file = staging.addFile({ kind: 'registry', fileName });
    staging.stageRegistry(file, stations, given);
    staging.describeFile(file, { sha256, rows: stations.length, accepted: stations.length });
    staging.seal();
    return await applyStaging(staging.jobId, { region: { id: regionId }, by });
  } finally {
    staging.discard();
  }
}
