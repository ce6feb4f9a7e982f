/** The job process: hands the outbox to the queue and does the jobs, until it is told to stop (SIGTERM, SIGINT). */
import './load-environment';
import { closeDatabase } from '@/db/client';
import { log } from '@/lib/api/log';
import { jobHandlers } from '@/lib/jobs';
import { environment } from '@/lib/services/environment';
import { startJobs } from '@/lib/services/jobs';

const jobs = await startJobs(environment().databaseUrl, jobHandlers);
log.info('the job process runs');

let stopping = false;
for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.on(signal, () => {
    if (stopping) return;
    stopping = true;
    jobs
      .stop()
      .then(closeDatabase)
      .then(
        () => process.exit(0),
        (error: unknown) => {
          log.error({ err: error }, 'could not stop in order');
          process.exit(1);
        },
      );
  });
}
