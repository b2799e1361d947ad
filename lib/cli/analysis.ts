import { readFileSync, renameSync, writeFileSync } from 'node:fs';
import { basename } from 'node:path';
import type { ResolvedBasis } from '../basis.ts';
import { type Basis, BasisError, parseBasis } from '../basis.ts';
import type { Format } from '../export/format.ts';
import { FORMATS } from '../export/format.ts';
import type { Narrowing } from '../export/narrow.ts';
import type { Provenance } from '../export/provenance.ts';
import { metadataName } from '../export/table-metadata.ts';
import { settleResults } from '../jobs/cached.ts';
import { closePool } from '../jobs/pool.ts';
import { regionDataHash } from '../store/records.ts';
import { getRegion, listRegions, type RegionRow, slugOf } from '../store/regions.ts';
import { listStations } from '../store/stations.ts';
import { UsageError } from './usage-error.ts';

/** The options that every analysis takes. */
export const ANALYSIS_OPTIONS = {
  region: { type: 'string' },
  basis: { type: 'string' },
  format: { type: 'string', default: 'csv' },
  out: { type: 'string' },
  station: { type: 'string', multiple: true },
} as const;

export const ANALYSIS_HELP = `  --region NAME    the region, by its name
  --basis FILE     JSON with any subset of the basis's keys; the others are the region's own
  --format FORM    csv (default), json or geojson
  --out FILE       write there and not to stdout; of a CSV file the columns, units and basis go beside it
                   into FILE-metadata.json
  --station CODE   only this station; may be given several times
`;

export interface AnalysisValues {
  region?: string;
  basis?: string;
  format: string;
  out?: string;
  station?: string[];
}

/** What an analysis is asked for. */
export interface AnalysisRequest {
  region: RegionRow;
  basis: Basis;
  format: Format;
  out: string | null;
  narrowing: Narrowing;
}

/** Reads what all analyses have in common.
 *  @throws UsageError, BasisError for what cannot be followed; Error for a region or station that is not there */
export async function analysisRequest(values: AnalysisValues): Promise<AnalysisRequest> {
  // Words first: what is wrong with them is told whatever the database holds.
  const format = FORMATS.find((known) => known === values.format);
  if (!format) throw new UsageError(`--format takes ${FORMATS.join(', ')}, not "${values.format}".`);
  const region = await namedRegion(values.region);
  const basis = values.basis === undefined ? region.basis : parseBasis(readJson('--basis', values.basis), region.basis);
  const codes = values.station;
  if (codes) {
    const known = new Set((await listStations(region.id)).map(({ code }) => code));
    const unknown = codes.find((code) => !known.has(code));
    if (unknown !== undefined) throw new Error(`${region.name} has no station "${unknown}".`);
  }
  return { region, basis, format, out: values.out ?? null, narrowing: codes ? { codes } : {} };
}

/** The region of that name.
 *  @throws UsageError without a name; Error, naming the regions there are, for a name that none has */
export async function namedRegion(name: string | undefined): Promise<RegionRow> {
  if (name === undefined) throw new UsageError('Name the region with --region NAME.');
  const region = await getRegion(slugOf(name));
  if (region) return region;
  const names = (await listRegions()).map((one) => one.name);
  throw new Error(
    `There is no region "${name}". ${names.length ? `The regions are ${names.join(', ')}.` : 'Make one with "import".'}`,
  );
}

/** The content of a JSON file named by an option.
 *  @throws UsageError when it cannot be read or is no JSON */
export function readJson(option: string, path: string): unknown {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (cause) {
    throw new UsageError(`${option}: ${path} cannot be read.`, { cause });
  }
  try {
    return JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (cause) {
    const why = cause instanceof Error ? cause.message : String(cause);
    if (option === '--basis') throw new BasisError(`${path} is not JSON: ${why}`);
    throw new UsageError(`${option}: ${path} is not JSON: ${why}`, { cause });
  }
}

/** What stands beside a command's figures so that they can be made again: region, basis, hash of the data, warnings. */
export async function provenance(
  region: RegionRow,
  basis: ResolvedBasis,
  warnings: readonly string[] = [],
): Promise<Provenance> {
  const { id, slug, name, invented } = region;
  return { region: { slug, name, invented }, basis, dataHash: regionDataHash(id), warnings };
}

/** Hands over a product: to stdout, or whole into a file, with the metadata beside a CSV file. */
export async function deliver(
  { out, format }: AnalysisRequest,
  product: string,
  metadata: (fileName: string) => Record<string, unknown>,
): Promise<void> {
  if (out === null) {
    await new Promise<void>((resolve, reject) => {
      process.stdout.write(product, (error) => (error ? reject(error) : resolve()));
    });
    return;
  }
  writeWhole(out, product);
  if (format === 'csv') writeWhole(metadataName(out), `${JSON.stringify(metadata(basename(out)), null, 2)}\n`);
}

/** Writes a file so that it is there whole or not at all. */
function writeWhole(path: string, text: string): void {
  const part = `${path}.${process.pid}.part`;
  writeFileSync(part, text);
  renameSync(part, path);
}

/** Names stations that a product leaves out, on stderr. */
export function sayLeftOut(what: string, stations: readonly { code: string; name: string; reason: string }[]): void {
  for (const { code, name, reason } of stations) {
    const called = name === '' || name === code ? code : `${code} ${name}`;
    process.stderr.write(`${what}: ${called}: ${reason}\n`);
  }
}

/** Runs an analysis and lets the process end: stores what was computed and ends the workers. */
export async function withWorkers(analysis: () => Promise<number>): Promise<number> {
  try {
    return await analysis();
  } finally {
    await settleResults();
    await closePool();
  }
}
