import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

const ROOT = fileURLToPath(new URL('../../..', import.meta.url));
const BIN = join(ROOT, 'lib/cli/hungerstone.js');

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'hungerstone-cli-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

interface Ended {
  code: number | null;
  out: string;
  err: string;
}

/** Runs `hungerstone …` on a database of this file's own. */
function hungerstone(words: string[], { database = 'cli.db', cwd = ROOT, env = {} } = {}): Promise<Ended> {
  const child = spawn(process.execPath, [BIN, ...words], {
    cwd,
    env: { ...process.env, DATABASE_URL: `file:${join(folder, database)}`, HUNGERSTONE_TOKEN: '', ...env },
  });
  let out = '';
  let err = '';
  child.stdout.on('data', (bytes) => {
    out += bytes;
  });
  child.stderr.on('data', (bytes) => {
    err += bytes;
  });
  return new Promise((resolve) => child.on('close', (code) => resolve({ code, out, err })));
}

const lines = (text: string): string[] => text.split('\n').filter(Boolean);

describe('help and version', () => {
  test('--help lists every command on stdout', async () => {
    const { code, out, err } = await hungerstone(['--help']);
    expect([code, err]).toEqual([0, '']);
    for (const command of ['import', 'rank', 'minima', 'curves', 'backup', 'restore', 'serve']) {
      expect(out).toMatch(new RegExp(`^ {2}${command} `, 'm'));
    }
  });
  test('--version is that of package.json', async () => {
    const { version } = JSON.parse(readFileSync(join(ROOT, 'package.json'), 'utf8'));
    expect(await hungerstone(['--version'])).toEqual({ code: 0, out: `${version}\n`, err: '' });
  });
  test.each(['import', 'rank', 'minima', 'curves', 'backup', 'restore', 'serve'])(
    '%s --help tells its usage',
    async (command) => {
      const { code, out } = await hungerstone([command, '--help']);
      expect(code).toBe(0);
      expect(out.startsWith(`Usage: npx hungerstone ${command}`)).toBe(true);
    },
  );
});

describe('wrong usage ends with 2, says what would do, and puts nothing on stdout', () => {
  test.each([
    [[], /Usage: npx hungerstone COMMAND/],
    [['rnak'], /Unknown command "rnak"\. The commands are import, rank,/],
    [['rank', '--regoin', 'x'], /--regoin.*--region/],
    [['rank', '--region', 'x', '--format', 'xls'], /xls/],
    [['backup'], /--out FILE/],
    [['backup', '--out', BIN], /exists already/],
    [['restore'], /Give FILE/],
    [['restore', 'no-such-file'], /no-such-file does not exist/],
    [['serve', '--port', '70000'], /--port takes a whole number 0–65535, not "70000"/],
    [['serve', '--host', '0.0.0.0'], /HUNGERSTONE_TOKEN/],
    [['serve', 'now'], /"now" is one word too many/],
  ])('%j', async (words, message) => {
    const { code, out, err } = await hungerstone(words);
    expect(err).toMatch(message);
    expect([code, out]).toEqual([2, '']);
    expect(err).not.toMatch(/^\s+at /m);
  });
});

describe('failure ends with 1 and one clear line', () => {
  test('a region that there is not', async () => {
    const { code, out, err } = await hungerstone(['rank', '--region', 'Nowhere']);
    expect([code, out]).toEqual([1, '']);
    expect(lines(err)).toHaveLength(1);
    expect(err).toContain('There is no region "Nowhere".');
  });
  test('a port that is taken, before anything is built or made', async () => {
    const other = createServer();
    await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
    const { port } = other.address() as { port: number };
    try {
      const { code, out, err } = await hungerstone(['serve', '--port', String(port)], { database: 'taken.db' });
      expect([code, out]).toEqual([1, '']);
      expect(lines(err)).toEqual([
        `Port ${port} is taken by another program; choose one with --port, for example --port ${port + 1}.`,
      ]);
      expect(existsSync(join(folder, 'taken.db'))).toBe(false);
    } finally {
      other.close();
    }
  });
  test('an address that is not this machine’s', async () => {
    const { code, err } = await hungerstone(['serve', '--port', '0', '--host', '192.0.2.1'], {
      env: { HUNGERSTONE_TOKEN: 'x' },
    });
    expect(code).toBe(1);
    expect(lines(err)).toEqual(['192.0.2.1 is not an address of this machine; give another --host.']);
  });
  test('a database that is none', async () => {
    writeFileSync(
      join(folder, 'text.db'),
      'these are words and no database, and enough of them to look at\n'.repeat(20),
    );
    const { code, out, err } = await hungerstone(['rank', '--region', 'x'], { database: 'text.db' });
    expect([code, out]).toEqual([1, '']);
    expect(lines(err)).toHaveLength(1);
    expect(err).toContain('text.db');
  });
  test('a folder for the database that is a file', async () => {
    writeFileSync(join(folder, 'file'), '');
    const { code, err } = await hungerstone(['rank', '--region', 'x'], { database: 'file/in.db' });
    expect(code).toBe(1);
    expect(lines(err)).toHaveLength(1);
    expect(err).toMatch(/^Cannot write in .*file/);
  });
  test('another folder than the project’s root', async () => {
    const { code, err } = await hungerstone(['rank', '--region', 'x'], { cwd: folder });
    expect([code, err]).toEqual([2, `Run this from the project's root: cd ${ROOT.replace(/\/$/, '')}\n`]);
  });
});

test('import, rank, backup and restore: stdout carries the product only, and the backup brings the region back', async () => {
  const rows = ['station,date,flow'];
  for (let day = 0; day < 400; day++) {
    rows.push(`A,${new Date(Date.UTC(2001, 3, 1) + day * 86_400_000).toISOString().slice(0, 10)},${1 + (day % 7) / 8}`);
  }
  writeFileSync(join(folder, 'flows.csv'), `${rows.join('\n')}\n`);
  const imported = await hungerstone([
    'import',
    '--region',
    'Hand',
    '--unit',
    'm3/s',
    '--json',
    join(folder, 'flows.csv'),
  ]);
  expect([imported.code, imported.err.includes(' at ')]).toEqual([0, false]);
  expect(JSON.parse(imported.out).files[0]).toMatchObject({ accepted: 400, rejectedTotal: 0 });

  const ranked = await hungerstone(['rank', '--region', 'Hand']);
  expect(ranked.code).toBe(0);
  expect(ranked.out.split(/\r?\n/)[0].startsWith('rank,rank_low,rank_high,station_code,')).toBe(true);

  const file = join(folder, 'copy.backup');
  const saved = await hungerstone(['backup', '--out', file]);
  expect([saved.code, saved.out]).toEqual([0, '']);
  const elsewhere = { database: 'restored.db' };
  expect((await hungerstone(['rank', '--region', 'Hand'], elsewhere)).code).toBe(1);
  const restored = await hungerstone(['restore', file], elsewhere);
  expect([restored.code, restored.out]).toEqual([0, '']);
  expect((await hungerstone(['rank', '--region', 'Hand'], elsewhere)).out).toBe(ranked.out);
});

test('npx --no-install hungerstone finds the command', () => {
  const npx = spawnSync('npx', ['--no-install', 'hungerstone', '--version'], {
    cwd: ROOT,
    encoding: 'utf8',
    shell: true,
  });
  expect([npx.status, npx.stdout]).toEqual([
    0,
    readFileSync(join(ROOT, 'package.json'), 'utf8')
      .match(/"version": "([^"]+)"/)?.[1]
      .concat('\n'),
  ]);
});
