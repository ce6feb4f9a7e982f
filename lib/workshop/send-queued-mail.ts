/** Sends one queued mail. At least once: the Message-ID comes from the cause, so that a repeat is recognisable. */
import 'server-only';
import { z } from 'zod';
import type { HandledJob } from '@/lib/services/jobs';
import { sendMail } from '@/lib/services/mail';

const payload = z.object({
  to: z.email(),
  subject: z.string().min(1).max(200),
  text: z.string().min(1),
  cause: z.string().min(1),
});

export async function sendQueuedMail(job: HandledJob): Promise<void> {
  const mail = payload.parse(job.payload);
  const sent = await sendMail({ to: mail.to, subject: mail.subject, text: mail.text, messageIdFrom: mail.cause });
  if (!sent.ok) throw new Error(`the mail server did not take it: ${sent.message}`);
}
