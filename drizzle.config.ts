import { defineConfig } from 'drizzle-kit';

export default defineConfig({ dialect: 'turso', schema: './db/schema/index.ts', out: './db/migrations' });
