import { defineConfig } from 'drizzle-kit';

/** `npm run db:generate -- --name what-it-does`; grants and triggers are added by `--custom` migrations. */
export default defineConfig({
  dialect: 'postgresql',
  schema: './db/schema/*.ts',
  out: './drizzle',
});
