import { defineConfig } from 'prisma/config';

// The migrations are applied by lib/store/migrate.ts; this file lets Prisma's own command line agree with it.
export default defineConfig({
  schema: 'prisma/schema.prisma',
  migrations: { path: 'prisma/migrations' },
  datasource: { url: process.env.DATABASE_URL ?? 'file:./data/hungerstone.db' },
});
