import { closeSharedConnections, openConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { PrismaClient } from './generated/client.ts';
import { LocalLibSql } from './local-libsql.ts';

/** An open database: Prisma for everything but bulk blobs. */
export interface Store {
  path: string;
  prisma: PrismaClient;
}

// One module exists several times in a Next server; the store must not.
const KEY = Symbol.for('hungerstone.store');
const holder = globalThis as { [KEY]?: Store };

/** The process's store, opened on first use. Applies no migration: see migrate.
 *  @param url  as databasePath takes it; another one than before closes the store that was open
 *  @throws StoreError when the file is absent, not writable or not a database */
export function openStore(url?: string): Store {
  const path = databasePath(url);
  const open = holder[KEY];
  if (open?.path === path) return open;
  openConnection(path).close();
  if (open) void open.prisma.$disconnect();
  const adapter = new LocalLibSql(path);
  holder[KEY] = {
    path,
    prisma: new PrismaClient({ adapter, transactionOptions: { maxWait: 5_000, timeout: 10_000 } }),
  };
  return holder[KEY];
}

/** Closes the store and this thread's connections, so that the file can be moved or the process can end. */
export async function closeStore(): Promise<void> {
  const open = holder[KEY];
  holder[KEY] = undefined;
  closeSharedConnections();
  await open?.prisma.$disconnect();
}
