import { closeDatabase } from '@/db/connection';
import { rebuildSummaries } from '@/lib/server/rebuild-summaries';
import { setLocalEnvironment } from './setup/local-environment.mjs';

/** Derives every summary anew from plans and entries. */
setLocalEnvironment();
try {
  const pours = await rebuildSummaries(new Date().toISOString());
  console.log(`${pours} pours summarised.`);
} finally {
  await closeDatabase();
}
