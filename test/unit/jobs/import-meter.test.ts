import { expect, test, vi } from 'vitest';
import { ImportMeter } from '../../../lib/jobs/import-meter.ts';
import type { ImportProgress } from '../../../lib/jobs/import-types.ts';

test('ImportMeter counts rows and bytes over all files, and ends at 1', () => {
  const told: ImportProgress[] = [];
  const meter = new ImportMeter([100, 300], (progress) => told.push(progress));
  meter.begin('a.csv', 1);
  meter.read(5, 60);
  meter.end(0, 10);
  meter.begin('b.csv', 2);
  expect(told.at(-1)).toMatchObject({ stage: 'reading', file: 'b.csv', fileNumber: 2, files: 2, rows: 10, bytes: 100 });
  expect(told.at(-1)!.share).toBeCloseTo(0.9 * 0.25, 9);
  meter.end(1, 30);
  meter.store(0.5);
  meter.done();
  expect(told.at(-1)).toMatchObject({ stage: 'done', share: 1, rows: 40, bytes: 400, totalBytes: 400 });
});

test('the share never falls', () => {
  const shares: number[] = [];
  const meter = new ImportMeter([0, 10], ({ share }) => shares.push(share));
  meter.begin('empty.csv', 1);
  meter.end(0, 0);
  meter.begin('b.csv', 2);
  meter.read(1, 10);
  meter.end(1, 1);
  meter.store(0);
  meter.store(1);
  meter.done();
  expect(shares).toEqual([...shares].sort((a, b) => a - b));
});

test('the time left follows from the share that is done and the time it took, once both tell something', () => {
  vi.useFakeTimers({ toFake: ['performance'] });
  try {
    const told: ImportProgress[] = [];
    const meter = new ImportMeter([1000], (progress) => told.push(progress));
    meter.begin('a.csv', 1);
    vi.advanceTimersByTime(500);
    meter.read(10, 100);
    expect(told.at(-1)!.secondsLeft).toBeNull();
    vi.advanceTimersByTime(3500);
    // 500 of 1,000 bytes are 45 % of the whole: 4 s went by, 4.9 are left
    meter.read(50, 500);
    expect(told.at(-1)!.secondsLeft).toBe(5);
    meter.end(0, 100);
    meter.done();
    expect(told.at(-1)!.secondsLeft).toBe(0);
  } finally {
    vi.useRealTimers();
  }
});
