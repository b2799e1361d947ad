import { execFile } from 'node:child_process';
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { expect, test } from 'vitest';
import { StoreBusyError, whenFree } from '../../../lib/store/busy.ts';
import { openConnection } from '../../../lib/store/connection.ts';
import { openStore } from '../../../lib/store/open.ts';
import { createRegion, getRegion } from '../../../lib/store/regions.ts';
import { bundleScript } from './bundle.ts';
import { temporaryDatabase } from './temporary-database.ts';

const run = promisify(execFile);
const place = temporaryDatabase();

/** Open file descriptors of this process; 0 where the system does not tell. */
const descriptors = (): number => (existsSync('/proc/self/fd') ? readdirSync('/proc/self/fd').length : 0);

test('500 interactive transactions leave few descriptors and keep foreign keys on', async () => {
  const { prisma } = openStore();
  const region = await createRegion({ name: 'Wethe' });
  const before = descriptors();
  for (let i = 0; i < 500; i++) {
    await prisma.$transaction(async (transaction) => {
      const { notes } = await transaction.station.upsert({
        where: { regionId_code: { regionId: region.id, code: 'A' } },
        create: { regionId: region.id, code: 'A', name: 'A', notes: '0' },
        update: {},
      });
      await transaction.station.updateMany({ data: { notes: String(Number(notes) + 1) } });
    });
  }
  expect(descriptors() - before).toBeLessThan(10);
  expect(await prisma.station.findFirst()).toMatchObject({ notes: '500' });
  expect(await prisma.$queryRaw`PRAGMA foreign_keys`).toEqual([{ foreign_keys: 1 }]);
  await expect(prisma.station.create({ data: { regionId: 999, code: 'X', name: 'X' } })).rejects.toThrow('Foreign key');
});

test('a transaction that throws leaves nothing, and two at once take turns', async () => {
  const { prisma } = openStore();
  const failing = prisma.$transaction(async (transaction) => {
    await transaction.region.create({ data: { slug: 'gone', name: 'Gone' } });
    throw new Error('changed my mind');
  });
  const keeping = prisma.$transaction((transaction) =>
    transaction.region.create({ data: { slug: 'kept', name: 'Kept' } }),
  );
  await expect(failing).rejects.toThrow('changed my mind');
  await keeping;
  expect((await prisma.region.findMany()).map(({ slug }) => slug)).toEqual(['kept']);
  await prisma.$transaction([
    prisma.region.create({ data: { slug: 'a', name: 'A' } }),
    prisma.region.create({ data: { slug: 'b', name: 'B' } }),
  ]);
  expect(await prisma.region.count()).toBe(3);
});

test('two processes that read, add one and write, 100 times each, lose no addition', async () => {
  await createRegion({ name: 'Counter' });
  const lines = `
    import { whenFree } from '@/lib/store/busy.ts';
    import { closeStore, openStore } from '@/lib/store/open.ts';
    const { prisma } = openStore();
    for (let i = 0; i < 100; i++) {
      await whenFree(() => prisma.$transaction(async (transaction) => {
        const { tileUrl } = await transaction.region.findUniqueOrThrow({ where: { slug: 'counter' } });
        await transaction.region.update({ where: { slug: 'counter' }, data: { tileUrl: String(Number(tileUrl ?? 0) + 1) } });
      }), { waitMs: 30_000 });
    }
    await closeStore();`;
  const script = await bundleScript(lines, join(place.folder, 'adder.mjs'));
  await Promise.all([1, 2].map(() => run(process.execPath, [script])));
  expect((await getRegion('counter'))?.tileUrl).toBe('200');
});

test('a write while another process holds the lock waits without holding up the thread, then says that it is busy', async () => {
  const holder = openConnection(place.path);
  holder.exec('BEGIN IMMEDIATE');
  let longest = 0;
  let last = performance.now();
  const watch = setInterval(() => {
    longest = Math.max(longest, performance.now() - last);
    last = performance.now();
  }, 1);
  const { prisma } = openStore();
  const create = () => prisma.region.create({ data: { slug: 'late', name: 'Late' } });
  const error = await whenFree(create, { waitMs: 600 }).catch((thrown: unknown) => thrown);
  expect(error).toBeInstanceOf(StoreBusyError);
  expect((error as StoreBusyError).retryAfterSeconds).toBeGreaterThan(0);
  expect(longest).toBeLessThan(250);
  clearInterval(watch);

  const transaction = () => prisma.$transaction((inside) => inside.region.create({ data: { slug: 'l', name: 'L' } }));
  await expect(whenFree(transaction, { waitMs: 100 })).rejects.toBeInstanceOf(StoreBusyError);
  // Readers never wait.
  expect(await getRegion('late')).toBeNull();
  const patient = whenFree(create);
  setTimeout(() => holder.exec('COMMIT'), 200);
  expect(await patient).toMatchObject({ slug: 'late' });
  holder.close();
});
