/** Which function does which job; the job process runs this table. */
import 'server-only';
import type { JobHandler, Queue } from './services/jobs';
import { sendQueuedMail } from './workshop/send-queued-mail';

export const jobHandlers: Partial<Record<Queue, JobHandler>> = {
  'send-mail': sendQueuedMail,
};
