import { spawn } from 'node:child_process';
import { copyFileSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { closeStore } from '../../../lib/store/open.ts';
import { recoverStore } from '../../../lib/store/recover.ts';
import { runCommand } from '../cli/run-command.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { sampleFiles } from './sample-files.ts';

const place = temporaryDatabase();
const KILLS = 50;
const PROJECT = join(import.meta.dirname, '../../..');

/** Flows of many stations over some of the days that stand, other values in part: records are laid anew, stations made. */
function moreFlows(): string {
  const lines = ['station,date,discharge_m3s'];
  const first = dayNumber(2009, 1, 1);
  for (const station of ['A1', 'B2', 'C3', ...Array.from({ length: 60 }, (_, i) => `N${i}`)]) {
    for (let day = first; day < first + 2000; day++) lines.push(`${station},${isoDate(day)},${(day % 97) / 10 + 0.05}`);
  }
  return `${lines.join('\n')}\n`;
}

/** All that readers see, without ids and clocks: what two databases that hold the same have in common. */
function seen(path: string): string {
  const connection = openConnection(path);
  const visible = "i.state IN ('applied', 'undoing')";
  const lists = [
    'SELECT slug, name, basis FROM Region ORDER BY slug',
    'SELECT code, name, river, latitude, longitude, areaKm2, influence, changes, namedFlows, notes FROM Station ORDER BY code',
    'SELECT name, kind, geojson FROM Layer ORDER BY name',
    `SELECT fileName, kind, sha256, rule, rows, accepted FROM Import i WHERE ${visible} ORDER BY id`,
    `SELECT i.fileName, s.code, p.quantity, p.firstDay, p.days, p.unit, p.codeList, p."values", p.codes FROM Part p
       JOIN Import i ON i.id = p.importId JOIN Station s ON s.id = p.stationId WHERE ${visible} ORDER BY i.id, s.code`,
    `SELECT s.code, r.quantity, r.hash, r.valueCount, COALESCE(l."values", p."values") FROM Record r
       JOIN Station s ON s.id = r.stationId LEFT JOIN Laid l ON l.id = r.laidId LEFT JOIN Part p ON p.id = r.partId
       ORDER BY s.code, r.quantity`,
  ].map((sql) => rows(connection, sql).all([]));
  expect(rows(connection, 'PRAGMA integrity_check').all([])).toEqual([['ok']]);
  expect(rows(connection, 'PRAGMA foreign_key_check').all([])).toEqual([]);
  connection.close();
  return JSON.stringify(lists, (_, value) => (Buffer.isBuffer(value) ? value.toString('base64') : value));
}

/** Parts and laid days that nothing points to, and files beside the database. */
function leftBehind(path: string): { orphans: unknown[]; files: string[] } {
  const connection = openConnection(path);
  const orphans = rows(
    connection,
    `SELECT 'part', COUNT(*) FROM Part WHERE importId NOT IN (SELECT id FROM Import WHERE state = 'applied')
     UNION ALL SELECT 'laid', COUNT(*) FROM Laid WHERE id NOT IN (SELECT laidId FROM Record WHERE laidId IS NOT NULL)
     UNION ALL SELECT 'import', COUNT(*) FROM Import WHERE state <> 'applied'`,
  ).all([]);
  connection.close();
  return { orphans, files: readdirSync(join(path, '..')).filter((name) => name.includes('.staging-')) };
}

/** Starts an import in a process group of its own and kills all of it after so many milliseconds; null lets it end.
 *  @returns exit code, null when it was killed, and how long it ran */
function importAndKill(database: string, files: readonly string[], after: number | null) {
  const began = performance.now();
  const child = spawn(
    process.execPath,
    ['lib/cli/hungerstone.js', 'import', '--region', 'Wethe', '--revise', ...files],
    { cwd: PROJECT, detached: true, stdio: 'ignore', env: { ...process.env, DATABASE_URL: `file:${database}` } },
  );
  const kill = () => {
    try {
      process.kill(-child.pid!, 'SIGKILL');
    } catch (error) {
      // It ended by itself a moment ago.
      if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
    }
  };
  const timer = after === null ? null : setTimeout(kill, after);
  return new Promise<{ code: number | null; ms: number }>((resolve, reject) => {
    child.on('error', reject);
    child.on('exit', (code) => {
      if (timer) clearTimeout(timer);
      resolve({ code, ms: performance.now() - began });
    });
  });
}

test(`an import killed at ${KILLS} moments leaves the database as before or as after`, async () => {
  const files = sampleFiles(join(place.folder, 'files'));
  expect((await runCommand('import', '--region', 'Wethe', files.flows)).code).toBe(0);
  await closeStore();
  const given = ['--layer', files.layer, files.write('more.csv', moreFlows())];
  const copyTo = (name: string): string => {
    const folder = join(place.folder, name);
    mkdirSync(folder);
    for (const end of ['', '-wal', '-shm']) {
      const from = `${place.path}${end}`;
      if (readdirSync(place.folder).includes(`hungerstone.db${end}`)) copyFileSync(from, join(folder, `h.db${end}`));
    }
    return join(folder, 'h.db');
  };
  const before = seen(place.path);
  const whole = copyTo('whole');
  const { code, ms } = await importAndKill(whole, given, null);
  expect(code).toBe(0);
  const after = seen(whole);
  expect(after).not.toBe(before);

  const outcomes = { before: 0, after: 0 };
  // Low-discrepancy moments over the whole run and a little beyond: the same ones each time, and none twice.
  for (let kill = 0; kill < KILLS; kill++) {
    const moment = (((kill + 1) * 0.618033988749895) % 1) * ms * 1.05;
    const database = copyTo(`kill-${kill}`);
    await importAndKill(database, given, moment);
    process.env.DATABASE_URL = `file:${database}`;
    await recoverStore({ deadAfterMs: 0 });
    await closeStore();
    const now = seen(database);
    expect([before, after].includes(now), `killed after ${Math.round(moment)} of ${Math.round(ms)} ms`).toBe(true);
    expect(leftBehind(database)).toEqual({
      orphans: [
        ['part', 0],
        ['laid', 0],
        ['import', 0],
      ],
      files: [],
    });
    outcomes[now === before ? 'before' : 'after']++;
    rmSync(join(place.folder, `kill-${kill}`), { recursive: true });
  }
  // Kills that all came too early or too late would show nothing.
  expect(outcomes.before).toBeGreaterThan(0);
  expect(outcomes.after).toBeGreaterThan(0);
}, 300_000);
