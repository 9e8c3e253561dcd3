import { runWorker } from '@/lib/server/jobs/run-worker';

/** The process that carries out jobs: mail, photographs, certificates, validity. Ends once the job at hand is done. */
await runWorker();
