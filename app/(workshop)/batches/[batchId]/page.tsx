import type { Metadata } from 'next';
import Link from 'next/link';
import { BatchNeeds } from '@/components/batches/batch-needs';
import { FinishForm } from '@/components/batches/finish-form';
import { ReserveActs } from '@/components/batches/reserve-acts';
import { CIRCUITS_LINKS } from '@/components/circuits/circuits-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Act } from '@/components/workshop/act';
import { dayText } from '@/components/workshop/clock-time';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import type { cancelBatch } from '@/lib/stores/cancel-batch';
import type { completeKit } from '@/lib/stores/complete-kit';
import { getBatch } from '@/lib/stores/get-batch';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Batch' };

export default async function BatchPage({ params }: { readonly params: Promise<{ batchId: string }> }) {
  const { batchId } = await params;
  const [batch, me] = await Promise.all([ask(getBatch, { batchId }), ask(whoAmI, {})]);
  const builds = me.roles.some((role) => role === 'builder' || role === 'lead');
  const may = (act: (typeof batch.acts)[number]) => batch.acts.includes(act);
  const short = batch.needsList.filter((need) => need.short > 0);
  const withoutPart = short.filter((need) => need.part === null);
  const toFind = short.filter((need) => need.free > 0 && need.part !== null);
  const underWay = may('cancel');
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Circuits" links={CIRCUITS_LINKS} />}
        title={batch.number}
        remainder={`${batch.units} × ${batch.circuit} ${batch.revision}`}
        facts={[
          <StateWord key="state" state={batch.state} strong />,
          batch.neededBy === null ? null : <>needed by {dayText(batch.neededBy)}</>,
          <>
            <Strong mono>{batch.covered}</Strong> of <Strong mono>{batch.needs}</Strong> lines covered
          </>,
          <>planned by {batch.createdBy}</>,
        ]}
        actions={
          <>
            {builds && underWay ? (
              <Act<typeof cancelBatch>
                endpoint="POST /batches/{batchId}/cancel"
                input={{ batchId }}
                word="Cancel the batch"
                busyWord="Cancelling …"
                kind="danger"
                text="What is reserved goes back to being free; what was picked goes back to its bins."
                questions={[{ field: 'reason', label: 'Why', optional: true }]}
                said={`${batch.number} is cancelled`}
              />
            ) : null}
            {batch.stopsOpen > 0 ? (
              <ButtonLink
                kind={builds && may('reserve') && toFind.length > 0 ? 'secondary' : 'primary'}
                href={`/batches/${batchId}/pick`}
              >
                Pick {batch.stopsOpen} {batch.stopsOpen === 1 ? 'stop' : 'stops'}
              </ButtonLink>
            ) : null}
          </>
        }
      />
      {builds && may('reserve') && short.length > 0 ? (
        <ReserveActs batchId={batchId} number={batch.number} canFind={toFind.length} short={short.length} />
      ) : null}
      {short.length > 0 && underWay ? (
        <div className="my-4">
          <Notice
            tone="look"
            title={`${short.length} ${short.length === 1 ? 'line is' : 'lines are'} short`}
            actions={
              <>
                {withoutPart.length > 0 ? (
                  <ButtonLink href={`/revisions/${batch.revisionId}?standing=ask&units=${batch.units}`}>
                    Choose parts for {withoutPart.length}
                  </ButtonLink>
                ) : null}
                <ButtonLink href="/shortfalls">See what has to be bought</ButtonLink>
                {builds && may('complete-kit') ? (
                  <Act<typeof completeKit>
                    endpoint="POST /batches/{batchId}/complete-kit"
                    input={{ batchId }}
                    word="Call the kit complete without them"
                    busyWord="Noting …"
                    title="Build without what is missing"
                    text="What is still reserved is released, and nothing more is bought for this batch."
                    questions={[{ field: 'reason', label: 'Why it may be built like that' }]}
                    said="The kit is complete"
                  />
                ) : null}
              </>
            }
          >
            {withoutPart.length > 0
              ? `${withoutPart.length} of them have no part chosen yet; a decision on the line covers it here too.`
              : 'They are on the list of shortfalls until they are on the shelf.'}
          </Notice>
        </div>
      ) : null}
      {builds && may('finish') ? (
        <Section title="Finish" remainder="with what is left going back to the bins">
          <FinishForm
            batchId={batchId}
            number={batch.number}
            needs={batch.needsList.filter((need) => need.picked > 0)}
          />
        </Section>
      ) : null}
      <Section title="What it needs" remainder={`for ${batch.units} ${batch.units === 1 ? 'unit' : 'units'}`}>
        <BatchNeeds needs={batch.needsList} revisionId={batch.revisionId} underWay={underWay} />
      </Section>
      {batch.state === 'finished' || batch.state === 'cancelled' ? (
        <p className="mt-4 text-soft">
          Every unit that moved for it is in the{' '}
          <Link href={`/ledger?batchId=${batchId}`} className="text-copper hover:underline">
            ledger
          </Link>
          .
        </p>
      ) : null}
    </>
  );
}
