/** Which function does which job; the job process runs this table. */
import 'server-only';
import { matchRevision, matchStockChanged } from './circuits/match-revision';
import { readUpload } from './circuits/read-upload';
import { refundPayment } from './purchasing/refund-payment';
import { mailOrder } from './purchasing/send-order';
import { handlePaymentEvent } from './purchasing/settle-payment';
import type { JobHandler, Queue } from './services/jobs';
import { sendQueuedMail } from './workshop/send-queued-mail';

export const jobHandlers: Record<Queue, JobHandler> = {
  'read-upload': readUpload,
  'match-revision': matchRevision,
  'match-stock-changed': matchStockChanged,
  'send-mail': sendQueuedMail,
  'send-order': mailOrder,
  'payment-event': handlePaymentEvent,
  'refund-payment': refundPayment,
};
