import { PrismaLibSql } from '@prisma/adapter-libsql';
import { openConnection } from './connection.ts';
import { localClient } from './local-client.ts';

/** Prisma's libSQL adapter on a local file, through a client of ours: see localClient for what the stock one does wrong.
 *  @throws StoreError when the file cannot be opened */
export class LocalLibSql extends PrismaLibSql {
  constructor(readonly path: string) {
    super({ url: 'file:' });
  }

  override createClient(): ReturnType<PrismaLibSql['createClient']> {
    const connection = openConnection(this.path);
    connection.exec('PRAGMA foreign_keys=ON');
    return localClient(connection);
  }
}
