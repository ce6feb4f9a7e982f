/** Giving a count up; nothing of it is booked, and its bins stay due. */
import 'server-only';
import { z } from 'zod';
import { id } from '@/lib/api/fields';
import { command } from '@/lib/api/use-case';
import { entered, openIn } from './enter-counts';
import { countAfter, COUNTERS, lockCount, moveCount } from './locked-count';

export const abandonCount = command({
  name: 'counts.abandon',
  http: 'POST /counts/{countId}/abandon',
  summary: 'Give a count up; nothing of it is booked.',
  roles: COUNTERS,
  input: z.strictObject({ countId: id() }),
  output: entered,
  async run({ tx, actor, input, record }) {
    const count = await lockCount(tx, actor.workshopId, input.countId);
    const next = countAfter(count, 'abandon');
    await moveCount(tx, count, next);
    record(count.id);
    return {
      id: count.id,
      number: count.number,
      state: next,
      entered: 0,
      ...(await openIn(tx, actor.workshopId, count.id)),
    };
  },
});
