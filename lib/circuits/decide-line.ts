/** A person's word on a line: this part, because …; or none, because …. The newest holds; lines alike are offered it. */
import 'server-only';
import { z } from 'zod';
import { decision } from '@/db/schema/circuits';
import { id } from '@/lib/api/fields';
import { Refusal } from '@/lib/api/problem';
import { command } from '@/lib/api/use-case';
import { weighOne } from './assess-part';
import { lineInView, lookAtLine } from './line-in-view';
import { VERDICTS } from './line-standing';
import { lockLine } from './locked-revision';
import { matchLines } from './match-revision';

/** What a decision is stored under that nobody wants to hear of again: equal to no specification. */
const NOT_REMEMBERED = '';

export const decideLine = command({
  name: 'lines.decide',
  http: 'POST /lines/{lineId}/decision',
  summary:
    'Choose a part for a line, or none (null: buy what was asked for). A refused part can’t be chosen; one that asks, or whose figures move, needs a reason.',
  roles: ['builder', 'lead'],
  input: z.strictObject({
    lineId: id(),
    partId: id().nullable(),
    reason: z.string().trim().max(500).default(''),
    /** Offer it again for lines that ask for the same. */
    remember: z.boolean().default(true),
  }),
  output: z.object({
    id: id(),
    lineId: id(),
    partId: id().nullable(),
    verdict: z.enum([...VERDICTS, 'none']),
    line: lineInView,
  }),
  async run({ tx, actor, input, record }) {
    const { revision } = await lockLine(tx, actor.workshopId, input.lineId);
    const line = await lookAtLine(tx, actor.workshopId, input.lineId);
    if (!line.fitted) throw new Refusal('state.refused', 'This line is not fitted, so it needs no part.');
    const weighed = input.partId === null ? null : await weighOne(tx, actor.workshopId, line, input.partId);
    if (weighed?.verdict === 'refused') {
      const failed = weighed.checks.filter((check) => check.outcome === 'fail');
      throw new Refusal(
        'rule.forbids',
        `It may not stand in here: ${failed.map((check) => check.why).join(' ') || 'the checks refuse it.'} Nothing was decided.`,
        {
          errors: failed.map((check) => ({ pointer: '/partId', code: check.check, detail: check.why })),
          more: { verdict: weighed.verdict, checks: weighed.checks },
        },
      );
    }
    if (weighed?.verdict === 'ask' && input.reason === '') {
      const open = weighed.checks.filter((check) => check.outcome === 'unknown');
      throw new Refusal(
        'input.invalid',
        `Say why it will do, since the checks can’t: ${open.map((check) => check.why).join(' ')} Nothing was decided.`,
        {
          errors: [{ pointer: '/reason', code: 'too_small', detail: 'a reason is needed' }],
          more: { verdict: weighed.verdict, checks: weighed.checks },
        },
      );
    }
    const verdict = weighed?.verdict ?? ('none' as const);
    const [made] = await tx
      .insert(decision)
      .values({
        workshopId: actor.workshopId,
        lineId: line.id,
        partId: input.partId,
        verdict,
        reason: input.reason,
        specKey: input.remember ? line.specKey : NOT_REMEMBERED,
        decidedBy: actor.personId,
        decidedAt: new Date(),
      })
      .returning({ id: decision.id });
    if (!made) throw new Error('the insert returned no row');
    await matchLines(tx, actor.workshopId, revision.id, [line.id]);
    record(line.id, { decision: made.id, partId: input.partId, verdict, reason: input.reason });
    return { id: made.id, lineId: line.id, partId: input.partId, verdict, line };
  },
});
