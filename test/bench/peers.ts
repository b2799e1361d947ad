import { spawnSync } from 'node:child_process';
import { existsSync, rmSync } from 'node:fs';

const PYTHON = '/usr/bin/python3';

export const say = (text: string): void => void process.stdout.write(`${text}\n`);

/** Prints one line: what, seconds, rows a second, and peak memory where it was measured. */
export function sayRate(what: string, rows: number, seconds: number, peakMB: number | null): void {
  const rate = `${(rows / seconds / 1e6).toFixed(2)} M rows/s`;
  const peak = peakMB === null ? '' : `  peak ${peakMB} MB`;
  say(`${what.padEnd(38)} ${seconds.toFixed(2).padStart(7)} s  ${rate.padStart(14)}${peak}`);
}

const PANDAS = `
import json, resource, sys, time
import pandas
start = time.perf_counter()
table = pandas.read_csv(sys.argv[1], parse_dates=['date'], dtype={'station': str})
seconds = time.perf_counter() - start
peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss // 1024
print(json.dumps({'rows': len(table), 'seconds': seconds, 'peakMB': peak, 'version': pandas.__version__}))
`;

/** Reads a long table with pandas.read_csv, dates parsed, and prints how long that took.
 *  @returns seconds; null where there is no pandas */
export function readByPandas(path: string): number | null {
  const run = existsSync(PYTHON) ? spawnSync(PYTHON, ['-c', PANDAS, path], { encoding: 'utf8' }) : null;
  if (run === null || run.status !== 0) {
    say(`pandas: ${run === null ? 'no Python' : 'not installed'} at ${PYTHON} here, so nothing to compare with`);
    return null;
  }
  const { rows, seconds, peakMB, version } = JSON.parse(run.stdout);
  sayRate(`pandas ${version} read_csv, parse_dates`, rows, seconds, peakMB);
  return seconds;
}

/** Imports a long table into a fresh SQLite file by the sqlite3 shell's .import, and prints how long that took.
 *  @returns seconds; null where there is no sqlite3 */
export function importBySqlite(path: string, rows: number): number | null {
  const database = `${path}.sqlite`;
  const begun = performance.now();
  const run = spawnSync('sqlite3', [database, '.mode csv', `.import "${path}" flows`], { encoding: 'utf8' });
  const seconds = (performance.now() - begun) / 1000;
  rmSync(database, { force: true });
  if (run.error !== undefined || run.status !== 0) {
    say('sqlite3: not installed here, so nothing to compare with');
    return null;
  }
  const version = spawnSync('sqlite3', ['--version'], { encoding: 'utf8' }).stdout.split(' ')[0];
  sayRate(`sqlite3 ${version} .import`, rows, seconds, null);
  return seconds;
}
