/** Runs once when the server starts: configuration checked, database brought up to date, jobs started. */
export async function register() {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { env } = await import('@/lib/env');
  const { database } = await import('@/db/client');
  const { migrateDatabase } = await import('@/db/migrate');
  const { startJobs } = await import('@/lib/jobs/run');
  env();
  await migrateDatabase(database());
  startJobs();
}
