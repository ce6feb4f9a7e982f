import type { Metadata } from 'next';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle } from '@/components/ui/page-title';
import { clockText, weekdayText } from '@/components/workshop/clock-time';
import { ask } from '@/lib/api/ask';
import { whatWaits } from '@/lib/workshop/what-waits';

export const metadata: Metadata = { title: 'Today' };

const NUMBER_WORDS = [
  'Nothing waits',
  'One thing waits',
  'Two things wait',
  'Three things wait',
  'Four things wait',
  'Five things wait',
  'Six things wait',
  'Seven things wait',
  'Eight things wait',
  'Nine things wait',
];

export default async function TodayPage() {
  const { waiting, recent } = await ask(whatWaits, {});
  const said = NUMBER_WORDS[waiting.length] ?? `${waiting.length} things wait`;
  return (
    <div className="max-w-[720px]">
      <PageTitle title="Today" facts={[`${weekdayText(new Date())}. ${said} for you.`]} />
      {waiting.length === 0 ? (
        <EmptyState title="Nothing waits for you" actions={<ButtonLink href="/circuits">Read a parts list</ButtonLink>}>
          When a list has a question, a kit can be picked or a bag comes in, it stands here.
        </EmptyState>
      ) : (
        <ul className="border-t border-ink" aria-label="What waits for you">
          {waiting.map((item) => (
            <li key={item.what} className="flex items-center gap-4 border-b border-rule py-3">
              <span className="w-12 shrink-0 text-right font-mono text-[1.5rem] font-bold">{item.count}</span>
              <span className="min-w-0 flex-1">
                <span className="block font-semibold">{item.title}</span>
                <span className="block break-words text-soft">{item.detail}</span>
              </span>
              <ButtonLink href={item.href}>
                {item.act}
                <span className="sr-only">: {item.title}</span>
              </ButtonLink>
            </li>
          ))}
        </ul>
      )}
      <section className="mt-8" aria-labelledby="since">
        <h2 id="since" className="text-lead font-bold">
          Since yesterday
        </h2>
        {recent.length === 0 ? (
          <p className="text-soft">Nothing moved in the stores.</p>
        ) : (
          <ul className="mt-1">
            {recent.map((entry, index) => (
              // Lines of a ledger page never change places.
              <li
                key={index}
                className="grid grid-cols-[3.5rem_8rem_1fr_auto] items-baseline gap-x-4 border-b border-hair py-1.5 max-sm:grid-cols-[3.5rem_1fr_auto]"
              >
                <span className="font-mono text-small text-soft">{clockText(entry.at)}</span>
                <span className="max-sm:col-span-2">{entry.person}</span>
                <span className="max-sm:col-span-2 max-sm:col-start-2 max-sm:row-start-2">{entry.said}</span>
                <span className="font-mono text-small text-soft">{entry.binCode}</span>
              </li>
            ))}
          </ul>
        )}
      </section>
    </div>
  );
}
