import { openStore } from './open.ts';

/** Resolves when the database answers a question about its own tables.
 *  @throws whatever keeps it from answering */
export async function askDatabase(): Promise<void> {
  await openStore().prisma.region.findFirst({ select: { id: true } });
}
