import { defineConfig } from 'drizzle-kit'

/*
 * For looking, not for writing: `npx drizzle-kit export` prints what the tables would be without what is added by hand
 * (STRICT, triggers, checks). The migrations that run stand in server/database/migrations.
 */
export default defineConfig({ dialect: 'sqlite', schema: './server/database/schema.ts' })
