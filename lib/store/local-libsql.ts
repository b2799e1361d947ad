import { PrismaLibSql } from '@prisma/adapter-libsql';

type Client = ReturnType<PrismaLibSql['createClient']>;
type Transaction = Awaited<ReturnType<Client['transaction']>>;
type Statement = Parameters<Transaction['batch']>[0][number];

/** Prisma's libSQL adapter for a local file, with transactions on the one connection it has.
 *
 *  The stock client gives every transaction the connection for its own and opens a new one for what follows: two file
 *  descriptors and the PRAGMAs are lost each time, and it begins deferred, so that two processes that read, merge and
 *  write run into each other. Here a transaction begins immediate on the same connection; Prisma already lets nothing
 *  else run on it meanwhile. */
export class LocalLibSql extends PrismaLibSql {
  override createClient(config: Parameters<PrismaLibSql['createClient']>[0]): Client {
    const client = super.createClient(config);
    for (const pragma of ['synchronous=NORMAL', 'foreign_keys=ON']) void client.execute(`PRAGMA ${pragma}`);
    const transaction = async (): Promise<Transaction> => {
      await client.execute('BEGIN IMMEDIATE');
      let open = true;
      const end = async (sql: 'COMMIT' | 'ROLLBACK') => {
        if (!open) return;
        open = false;
        await client.execute(sql);
      };
      const run = (statement: Statement) =>
        Array.isArray(statement) ? client.execute(statement[0], statement[1]) : client.execute(statement);
      return {
        execute: client.execute.bind(client),
        batch: async (statements: Statement[]) => {
          const results = [];
          for (const statement of statements) results.push(await run(statement));
          return results;
        },
        executeMultiple: () => {
          throw new Error('LocalLibSql: executeMultiple inside a transaction would end it');
        },
        commit: () => end('COMMIT'),
        rollback: () => end('ROLLBACK'),
        close: () => void end('ROLLBACK'),
        get closed() {
          return !open;
        },
      };
    };
    return Object.assign(client, { transaction });
  }
}
