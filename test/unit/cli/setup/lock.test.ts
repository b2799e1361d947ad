import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { withLock } from '../../../../lib/cli/setup/lock.js';

let file: string;
beforeEach(() => {
  file = join(mkdtempSync(join(tmpdir(), 'hungerstone-lock-')), 'a.lock');
  vi.spyOn(process.stderr, 'write').mockReturnValue(true);
});
afterEach(() => {
  vi.restoreAllMocks();
  rmSync(join(file, '..'), { recursive: true });
});

test('withLock runs two pieces of work one after the other and leaves no lock', async () => {
  const steps: string[] = [];
  const work = (name: string) => async () => {
    steps.push(`${name} begins`);
    await wait(50);
    steps.push(`${name} ends`);
    return name;
  };
  expect(await Promise.all([withLock(file, 'x', work('a')), withLock(file, 'x', work('b'))])).toEqual(['a', 'b']);
  const first = steps[0].split(' ')[0];
  expect(steps[1]).toBe(`${first} ends`);
  expect(steps).toHaveLength(4);
  expect(existsSync(file)).toBe(false);
});

test('withLock gives the lock back when the work fails', async () => {
  const failure = withLock(file, 'x', () => Promise.reject(new Error('broken')));
  await expect(failure).rejects.toThrow('broken');
  expect(existsSync(file)).toBe(false);
});

test('withLock takes over the lock of a process that no longer lives', async () => {
  const { pid } = spawnSync(process.execPath, ['-e', '']);
  writeFileSync(file, String(pid));
  expect(await withLock(file, 'x', async () => 'done')).toBe('done');
});

test('withLock waits while a living process holds it, and says for what', async () => {
  writeFileSync(file, String(process.ppid));
  let done = false;
  const work = withLock(file, 'the packages', async () => {
    done = true;
  });
  await wait(400);
  expect(done).toBe(false);
  expect(vi.mocked(process.stderr.write).mock.calls.join()).toContain('the packages');
  rmSync(file);
  await work;
  expect(done).toBe(true);
});
