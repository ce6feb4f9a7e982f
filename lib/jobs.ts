/** Which function does which job; the job process runs this table. */
import 'server-only';
import { refundPayment } from './purchasing/refund-payment';
import { mailOrder } from './purchasing/send-order';
import { handlePaymentEvent } from './purchasing/settle-payment';
import type { JobHandler, Queue } from './services/jobs';
import { sendQueuedMail } from './workshop/send-queued-mail';

export const jobHandlers: Partial<Record<Queue, JobHandler>> = {
  'send-mail': sendQueuedMail,
  'send-order': mailOrder,
  'payment-event': handlePaymentEvent,
  'refund-payment': refundPayment,
};
