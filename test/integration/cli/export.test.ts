import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { unzipSync } from 'fflate';
import { expect, test } from 'vitest';
import { parseBasis } from '../../../lib/basis.ts';
import { dayNumber, parseIsoDate } from '../../../lib/calendar/day.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { listImports } from '../../../lib/store/imports.ts';
import { rejectLink } from '../../../lib/store/link-rejections.ts';
import { setLink } from '../../../lib/store/links.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { migrate } from '../../../lib/store/migrate.ts';
import { closeStore } from '../../../lib/store/open.ts';
import { getRegion, setRegionBasis, setRegionTiles } from '../../../lib/store/regions.ts';
import { saveMapping } from '../../../lib/store/saved-mappings.ts';
import { editStation } from '../../../lib/store/station-edit.ts';
import { sampleFiles } from '../jobs/sample-files.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { runCommand } from './run-command.ts';

const place = temporaryDatabase();

/** A region with all that a person can put into one. */
async function fullRegion(): Promise<void> {
  const files = sampleFiles(join(place.folder, 'files'));
  const run = async (...argv: string[]) => {
    const { code, stderr } = await runCommand('import', '--region', 'Wethe', ...argv);
    expect(code, stderr).toBe(0);
  };
  await run('--stations', files.registry, '--layer', files.layer, files.flows);
  // Estimated and provisional days, a missing word, a flow below detection; some days stand already with other values.
  const more = [
    'station,date,flow,flag',
    'B2,2009-12-30,7.5,A:e',
    'B2,2010-01-01,<0.05,P',
    'B2,2010-01-02,kaputt,',
    'B2,2010-01-04,1e-7,"x, y"',
  ];
  const mapping = files.write('mapping.json', JSON.stringify({ missing: ['kaputt'], flags: { 'x, y': ['ice'] } }));
  await run('--revise', '--unit', 'ft3/s', '--mapping', mapping, files.write('more flows.csv', `${more.join('\n')}\n`));
  await run(
    '--unit',
    'm',
    '--mapping',
    files.write('stage.json', JSON.stringify({ quantity: 'stage', value: { column: 'level' } })),
    '--station',
    'A1',
    files.write('stage.csv', 'date,level\n2001-01-01,1.25\n2001-01-02,-0.5\n2001-01-03,1\n'),
  );
  const { id } = (await getRegion('wethe'))!;
  await editStation(id, 'A1', {
    changes: [{ date: '1999-05-01', kind: 'dam', note: 'Reservoir filled.' }],
    namedFlows: [{ name: 'Minimum', kind: 'legal minimum', value: 0.4, unit: 'm3/s', months: [6, 7, 8] }],
    notes: 'Read twice a day until 1990.',
  });
  await setLink(id, { upstream: 'A1', downstream: 'B2', source: 'person' });
  await rejectLink(id, { upstream: 'C3', downstream: 'B2' }, true);
  const connection = openConnection(place.path);
  const [stationId] = rows(connection, "SELECT id FROM Station WHERE code = 'B2'").get([]) as [number];
  connection.close();
  await addMark({
    stationId,
    firstDay: dayNumber(1999, 1, 1),
    lastDay: parseIsoDate('1999-01-31'),
    kind: 'reject',
    reason: 'Weed at the weir',
    by: 'H. F.',
  });
  await saveMapping(id, { name: 'Ours', mapping: { unit: 'L/s', decimal: ',' } });
  await setRegionBasis('wethe', parseBasis({ days: 30, minYears: 15 }));
  await setRegionTiles('wethe', { url: 'https://tiles.example/{z}/{x}/{y}.png', attribution: 'Example' });
}

function filesOf(path: string): Record<string, string> {
  const entries = unzipSync(readFileSync(path));
  return Object.fromEntries(Object.entries(entries).map(([name, bytes]) => [name, new TextDecoder().decode(bytes)]));
}

/** Every record as it stands, with what marks on it and its station's code. */
function recordsIn(path: string): unknown[] {
  const connection = openConnection(path);
  const found = rows(
    connection,
    'SELECT s.code, r.quantity, r.hash, r.unit, r.firstDay, r.days FROM Record r JOIN Station s ON s.id = r.stationId ORDER BY 1, 2',
  ).all([]);
  connection.close();
  return found;
}

test('export writes a region in open formats, and importing the archive elsewhere gives the same region', async () => {
  await fullRegion();
  const first = join(place.folder, 'first.zip');
  expect(await runCommand('export', '--region', 'Wethe', '--out', first)).toMatchObject({ code: 0, stdout: '' });
  const files = filesOf(first);
  expect(Object.keys(files).map((name) => name.replace(/^(\w+\/)\d+-/, '$1'))).toEqual(
    expect.arrayContaining(['README.txt', 'region.json', 'imports.json', 'stations.geojson', 'layers/rivers.geojson']),
  );
  const flows = Object.entries(files).find(([name]) => name.endsWith('more-flows.csv.csv'))![1];
  expect(flows.split('\r\n').slice(0, 5)).toEqual([
    'station_code,quantity,date,value,unit,flag',
    'B2,flow,2009-12-30,7.5,ft3/s,A:e',
    'B2,flow,2010-01-01,<0.05,ft3/s,P',
    'B2,flow,2010-01-02,kaputt,ft3/s,',
    'B2,flow,2010-01-04,1e-7,ft3/s,"x, y"',
  ]);
  const records = recordsIn(place.path);
  const imports = (await listImports((await getRegion('wethe'))!.id)).filter(({ kind }) => kind === 'flows');

  await closePool();
  await closeStore();
  const elsewhere = join(place.folder, 'elsewhere.db');
  process.env.DATABASE_URL = `file:${elsewhere}`;
  await migrate();
  const taken = await runCommand('import', '--region', 'Wethe', first);
  expect(taken, taken.stderr).toMatchObject({ code: 0 });
  expect(recordsIn(elsewhere)).toEqual(records);
  const region = (await getRegion('wethe'))!;
  expect(region).toMatchObject({ basis: { days: 30, minYears: 15 }, tileUrl: 'https://tiles.example/{z}/{x}/{y}.png' });
  const again = (await listImports(region.id)).filter(({ kind }) => kind === 'flows');
  const told = ({ id: _, undoing: __, ...entry }: (typeof again)[number]) => entry;
  expect(again.map(told)).toEqual(imports.map(told));

  const second = join(place.folder, 'second.zip');
  expect((await runCommand('export', '--region', 'Wethe', '--out', second)).code).toBe(0);
  // The history of registries and layers begins anew, and every document tells when it was written.
  const plain = (texts: Record<string, string>) =>
    Object.fromEntries(
      Object.entries(texts)
        .filter(([name]) => name !== 'imports.json')
        .map(([name, text]) => [
          name.replace(/\/\d+-|-\d+\.xml$/g, '/'),
          text.replace(/"layers\/\d+-/g, '"layers/').replace(/<wml2:generationDate>[^<]*/, ''),
        ]),
    );
  expect(plain(filesOf(second))).toEqual(plain(files));
});

test('export refuses to write over a file, names a region it does not know, and leaves nothing behind', async () => {
  const { registry } = sampleFiles(join(place.folder, 'files'));
  expect((await runCommand('import', '--region', 'Wethe', '--stations', registry)).code).toBe(0);
  const out = join(place.folder, 'files', 'flows.csv');
  expect(await runCommand('export', '--region', 'Wethe', '--out', out)).toMatchObject({ code: 2 });
  expect((await runCommand('export', '--region', 'Nowhere', '--out', join(place.folder, 'x.zip'))).stderr).toContain(
    'There is no region "Nowhere". The regions are Wethe.',
  );
  expect((await runCommand('export', '--region', 'Wethe')).code).toBe(2);
});
