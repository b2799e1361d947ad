import { createHash } from 'node:crypto';
import type { FoundFacts, StagedPart, Unit } from '../../../lib/intake/types.ts';
import { NO_ROW } from '../../../lib/series/day-codes.ts';
import type { Quantity } from '../../../lib/series/quantities.ts';
import { type Applied, type ApplyOptions, applyStaging } from '../../../lib/store/apply-staging.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { readSeries } from '../../../lib/store/records.ts';
import { createStaging, discardStaging } from '../../../lib/store/staging.ts';
import { listStations } from '../../../lib/store/stations.ts';

/** Every row of every table, blobs by their hash, and the counters: equal exactly when the databases hold the same. */
export function dump(path: string): string[] {
  const connection = openConnection(path);
  try {
    const tables = rows(connection, "SELECT name FROM sqlite_master WHERE type = 'table' ORDER BY name").all([]).flat();
    return (tables as string[]).flatMap((table) => {
      const order = table === 'sqlite_sequence' ? 'name' : 'rowid';
      const found = rows(connection, `SELECT * FROM "${table}" ORDER BY ${order}`).all([]) as unknown[][];
      return found.map((row) => `${table} ${JSON.stringify(row.map(plain))}`);
    });
  } finally {
    connection.close();
  }
}

const plain = (value: unknown): unknown =>
  Buffer.isBuffer(value) ? createHash('sha256').update(value).digest('hex') : value;

export interface PartInput {
  code: string;
  firstDay?: number;
  values: number[];
  /** quality code a day; null = no row */
  codes?: (string | null)[];
  unit?: Unit;
  quantity?: Quantity;
}

const BITS: Record<string, number> = { e: 1, P: 2, Ice: 4 };

export function partOf({ code, firstDay = 0, values, codes, unit = 'm3/s', quantity }: PartInput): StagedPart {
  const texts = [...new Set(['', ...(codes ?? []).filter((text) => text !== null)])];
  return {
    ...{ code, unit, firstDay, quantity },
    values: Float64Array.from(values),
    codes: Uint8Array.from(values, (_, day) => {
      const text = codes === undefined ? '' : codes[day];
      return text === null ? NO_ROW : texts.indexOf(text);
    }),
    codeList: texts.map((text) => ({ text, bits: BITS[text] ?? 0 })),
  };
}

let jobs = 0;

/** Takes in files of parts, each file an import, in one go.
 *  @param facts  of each file, what it states of stations */
export async function importFiles(
  files: PartInput[][],
  options: Omit<ApplyOptions, 'region'> & Partial<Pick<ApplyOptions, 'region'>> = {},
  facts: FoundFacts[][] = [],
): Promise<Applied> {
  const staging = createStaging(`test-${process.pid}-${jobs++}`);
  for (const [index, parts] of files.entries()) {
    const file = staging.addFile({ kind: 'flows', fileName: `flows-${index + 1}.csv` });
    for (const part of parts) staging.stagePart(file, partOf(part));
    staging.stageFacts(file, facts[index] ?? []);
    staging.describeFile(file, { sha256: 'none', rows: parts.length, accepted: parts.length });
  }
  staging.seal();
  try {
    return await applyStaging(staging.jobId, { region: { name: 'Wethe' }, ...options });
  } finally {
    discardStaging(staging.jobId);
  }
}

export interface SeenRecord {
  firstDay: number;
  values: number[];
  flags: number[];
  hash: string;
}

/** The records of a region as readers see them, by code. */
export async function seenRecords(regionId: number, quantity: Quantity = 'flow'): Promise<Record<string, SeenRecord>> {
  const stations = await listStations(regionId);
  const seen: Record<string, SeenRecord> = {};
  readSeries(
    stations.map(({ id }) => id),
    (stationId, { firstDay, values, flags }, hash) => {
      const { code } = stations.find(({ id }) => id === stationId)!;
      seen[code] = { firstDay, values: [...values], flags: [...flags], hash };
    },
    { quantity },
  );
  return seen;
}
