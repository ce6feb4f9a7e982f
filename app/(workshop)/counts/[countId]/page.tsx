import type { Metadata } from 'next';
import { CountEntry } from '@/components/stores/count-entry';
import { CountVariances } from '@/components/stores/count-variances';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { ProgressBar } from '@/components/ui/progress-bar';
import { Act } from '@/components/workshop/act';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import type { abandonCount } from '@/lib/stores/abandon-count';
import { getCount } from '@/lib/stores/get-count';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Count' };

export default async function CountPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ countId: string }>;
  readonly searchParams: Promise<{ bin?: string }>;
}) {
  const { countId } = await params;
  const { bin: asked } = await searchParams;
  const [count, me] = await Promise.all([ask(getCount, { countId }), ask(whoAmI, {})]);
  const mayCount = me.roles.some((role) => role === 'storekeeper' || role === 'lead');
  const blind = count.state === 'open' || count.state === 'recount';
  const open = count.binList.filter((bin) => !bin.looked || bin.toCount > 0);
  const current = open.find((bin) => bin.code === asked) ?? open[0] ?? null;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title={`Count ${count.number}`}
        remainder={count.reason}
        facts={[
          <StateWord key="state" state={count.state} strong />,
          <>
            <Strong mono>{count.bins}</Strong> bins, opened by {count.openedBy}
          </>,
          count.postedBy === null ? null : <>posted by {count.postedBy}</>,
        ]}
        actions={
          mayCount && count.acts.includes('abandon') ? (
            <Act<typeof abandonCount>
              endpoint="POST /counts/{countId}/abandon"
              input={{ countId }}
              word="Abandon"
              kind="danger"
              title={`Abandon count ${count.number}`}
              text="Nothing is booked; the bins stay due."
              said="The count was abandoned"
            />
          ) : undefined
        }
      />
      {blind ? (
        <div className="max-w-[34rem]">
          <div className="mb-4">
            <ProgressBar label="Counted" done={count.bins - open.length} total={count.bins} unit="bins" />
          </div>
          {mayCount && current !== null ? (
            <CountEntry
              key={`${current.binId} ${current.toCount} ${current.looked}`}
              countId={countId}
              bin={current}
              others={open.filter((bin) => bin.binId !== current.binId).map((bin) => bin.code)}
              expected={count.entryList
                .filter((entry) => entry.binId === current.binId && !entry.isCounted)
                .map((entry) => ({ id: entry.id, part: entry.part, attempt: entry.attempt }))}
            />
          ) : (
            <p className="text-soft">It is being counted by the storekeepers.</p>
          )}
        </div>
      ) : (
        <CountVariances
          countId={countId}
          state={count.state}
          entries={count.entryList}
          mayPost={mayCount && count.acts.includes('post')}
        />
      )}
    </>
  );
}
