/** Circuits, revisions read from their lists, and batches under way. */
import { and, eq, sql } from 'drizzle-orm';
import { withWorkshop } from '@/db/client';
import { line } from '@/db/schema/circuits';
import { bin } from '@/db/schema/stores';
import { demoCircuits } from '@/db/seed/circuits';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { decideLine } from '@/lib/circuits/decide-line';
import { createRevision } from '@/lib/circuits/create-revision';
import { matchLines } from '@/lib/circuits/match-revision';
import { openCount } from '@/lib/stores/open-count';
import { createBatch } from '@/lib/stores/create-batch';
import { finishBatch } from '@/lib/stores/finish-batch';
import { pickBatch } from '@/lib/stores/pick-batch';
import { pickList } from '@/lib/stores/pick-list';
import { reserveBatch } from '@/lib/stores/reserve-batch';
import { as, type People } from './acting';

export async function makeCircuits(workshopId: string, people: People): Promise<Map<string, string>> {
  const revisions = new Map<string, string>();
  for (const demo of demoCircuits) {
    const circuit = await as(people.builder, createCircuit, {
      name: demo.name,
      description: demo.description,
      railsVolts: [...demo.railsVolts],
    });
    for (const list of demo.revisions) {
      const made = await as(people.builder, createRevision, {
        circuitId: circuit.id,
        name: list.name,
        file: { name: list.fileName, bytes: new TextEncoder().encode(list.list) },
        freeze: list.freeze,
      });
      if (list.freeze && made.state !== 'frozen')
        throw new Error(
          `${demo.name} ${list.name} has open questions: ${made.questions.map((one) => one.ask).join('; ')}`,
        );
      revisions.set(`${demo.name} ${list.name}`, made.id);
      await withWorkshop(workshopId, async (tx) => {
        const lines = await tx
          .select({ id: line.id, designators: line.designators })
          .from(line)
          .where(and(eq(line.workshopId, workshopId), eq(line.revisionId, made.id)));
        for (const [designator, use] of Object.entries(demo.uses)) {
          const found = lines.find((one) => one.designators.includes(designator));
          if (found)
            await tx
              .update(line)
              .set({ use })
              .where(and(eq(line.workshopId, workshopId), eq(line.id, found.id)));
        }
        await matchLines(tx, workshopId, made.id);
      });
    }
  }
  return revisions;
}

/** What the checks can't settle by themselves, such as a jack by its description, somebody decided long ago. */
export async function decideUsual(workshopId: string, people: People, revisionIds: readonly string[]): Promise<void> {
  for (const revisionId of revisionIds) {
    const asking = await withWorkshop(workshopId, (tx) =>
      tx.execute<{ line_id: string; part_id: string }>(sql`
        select k.line_id, k.part_id from candidate k join line l on l.workshop_id = k.workshop_id and l.id = k.line_id
         where k.workshop_id = ${workshopId} and l.revision_id = ${revisionId} and k.rank = 1 and k.verdict = 'ask'
           and l.kind in ('connector', 'hardware', 'capacitor', 'switch') order by l.position`),
    );
    for (const one of asking.rows)
      await as(people.builder, decideLine, {
        lineId: one.line_id,
        partId: one.part_id,
        reason: 'the one this workshop always uses',
      });
  }
}

export async function makeBatches(
  workshopId: string,
  people: People,
  revisions: ReadonlyMap<string, string>,
): Promise<void> {
  const day = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);
  const plan = (name: string, units: number, days: number) =>
    as(people.builder, createBatch, { revisionId: revisions.get(name) ?? '', units, neededBy: day(days) });

  const folder = await plan('Wave Folder 1.0', 2, -5);
  await as(people.builder, reserveBatch, { batchId: folder.id, allowPart: true });
  await as(people.storekeeper, pickBatch, { batchId: folder.id });
  await as(people.builder, finishBatch, { batchId: folder.id }).catch(() => undefined);

  const filter = await plan('State-Variable Filter A', 3, 6);
  await as(people.builder, reserveBatch, { batchId: filter.id, allowPart: true });
  const stops = (await as(people.storekeeper, pickList, { batchId: filter.id })).stops;
  const [first] = stops;
  if (first)
    await as(people.storekeeper, pickBatch, {
      batchId: filter.id,
      picks: first.lines.map((line) => ({ reservationId: line.reservationId, quantity: line.take })),
    });

  const slopes = await plan('Slope Pair C', 2, 9);
  await as(people.builder, reserveBatch, { batchId: slopes.id, allowPart: true });
  await plan('Clock Divider A', 5, 20);
  await plan('Supply ±12 V A', 1, 30);

  await withWorkshop(workshopId, async (tx) => {
    const bins = await tx
      .select({ id: bin.id, code: bin.code })
      .from(bin)
      .where(eq(bin.workshopId, workshopId))
      .orderBy(bin.code);
    for (const [code, reason] of [
      ['A-10-1', 'missed at a pick last week'],
      ['A-13-2', 'due by its class'],
      ['B-05-4', 'due by its class'],
      ['B-12-3', 'missed at a pick last week'],
    ] as const) {
      const found = bins.find((one) => one.code === code);
      if (found)
        await tx
          .update(bin)
          .set({ countDueSince: new Date(Date.now() - 2 * 86_400_000), countDueReason: reason })
          .where(and(eq(bin.workshopId, workshopId), eq(bin.id, found.id)));
    }
    return bins;
  }).then((bins) =>
    as(people.storekeeper, openCount, {
      binIds: bins.filter((one) => /^C-01-[1-4]$/.test(one.code)).map((one) => one.id),
      reason: 'first cabinet column, monthly',
    }),
  );
}
