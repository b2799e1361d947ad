import { createWriteStream, renameSync, rmSync } from 'node:fs';
import { pipeline } from 'node:stream/promises';
import { regionArchive } from '../../export/archive/region-archive.ts';
import { namedRegion } from '../analysis.ts';
import { readArguments } from '../arguments.ts';
import { untilInterrupted } from '../interrupt.ts';
import { newFile } from '../new-file.ts';

export const usage = `Usage: npx hungerstone export --region NAME --out FILE.zip [options]

Writes a region as one archive of open formats: stations.geojson, the flows of every import as a long CSV table (values and
flags as written), every record as WaterML 2.0, imports.json, layers, and region.json with basis, links, marks and saved
mappings. "import" of the archive into another database gives the same region.

  --region NAME   the region, by its name
  --out FILE      must not exist yet
  --no-waterml    leave out the WaterML documents, which take the most room
`;

const OPTIONS = {
  region: { type: 'string' },
  out: { type: 'string' },
  'no-waterml': { type: 'boolean', default: false },
} as const;

export async function run(argv: string[]): Promise<number> {
  const { values } = readArguments(argv, OPTIONS);
  const out = newFile(values.out, 'FILE.zip');
  const region = await namedRegion(values.region);
  const part = `${out}.${process.pid}.part`;
  const cancel = new AbortController();
  const abort = () => cancel.abort(new Error('Cancelled; nothing was written.'));
  const write = async () => {
    const archive = await regionArchive(region, {
      ...{ withWaterml: !values['no-waterml'], signal: cancel.signal, onProgress: sayProgress() },
    });
    await pipeline(archive, createWriteStream(part), { signal: cancel.signal });
    renameSync(part, out);
  };
  try {
    await untilInterrupted(abort, write);
  } catch (error) {
    rmSync(part, { force: true });
    throw cancel.signal.aborted ? cancel.signal.reason : error;
  } finally {
    if (process.stderr.isTTY) process.stderr.write('\r\u001b[K');
  }
  process.stderr.write(`${region.name} is in ${out}.\n`);
  return 0;
}

/** One line that renews itself on a terminal; elsewhere a line at each tenth. */
function sayProgress(): (share: number, file: string) => void {
  let said = -1;
  return (share, file) => {
    const { stderr } = process;
    if (stderr.isTTY) stderr.write(`\r\u001b[KWriting ${file}: ${Math.round(share * 100)} %`);
    else if (Math.floor(share * 10) > said) {
      said = Math.floor(share * 10);
      stderr.write(`Writing: ${said * 10} %\n`);
    }
  };
}
