import { closeDatabase } from '@/db/connection';
import { verifyRecord } from '@/lib/server/record-verify';
import { setLocalEnvironment } from './setup/local-environment.mjs';

/** Checks the whole record. Ends with 1 when anything in it is not what was written. */
setLocalEnvironment();
try {
  const { projects, streams, entries, problems, heads } = await verifyRecord();
  for (const head of heads) {
    console.log(`${head.projectId} ${head.pourId ?? 'own stream'} no. ${head.seq} ${head.hash ?? '-'}`);
  }
  for (const problem of problems) console.error(problem);
  console.log(
    `${entries} entries in ${streams} streams of ${projects} projects: ${problems.length === 0 ? 'the record is as it was written' : `${problems.length} problems`}.`,
  );
  process.exitCode = problems.length === 0 ? 0 : 1;
} finally {
  await closeDatabase();
}
