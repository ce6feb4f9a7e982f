import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { PageTitle } from '@/components/ui/page-title';
import { ask } from '@/lib/api/ask';
import { findAnything } from '@/lib/stores/find-anything';

export const metadata: Metadata = { title: 'Found' };

/** Where the one field leads on Enter: straight to the one thing that fits, or to a list of what might. */
export default async function FindPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ q?: string | string[] }>;
}) {
  const { q } = await searchParams;
  const text = (typeof q === 'string' ? q : '').trim().slice(0, 200);
  if (text === '') {
    return (
      <PageTitle
        title="Type or scan anything"
        facts={['A part number, a value such as 4k7, a bin, an order, a batch, a circuit.']}
      />
    );
  }
  const { hits } = await ask(findAnything, { q: text });
  const exact = hits.filter((hit) => hit.exact);
  const [only] = exact.length === 1 ? exact : hits.length === 1 ? hits : [];
  if (only) redirect(only.href);
  return (
    <div className="max-w-[720px]">
      <PageTitle
        title={`“${text}”`}
        facts={[hits.length === 0 ? 'Nothing here is called that.' : `${hits.length} things might be meant.`]}
      />
      {hits.length === 0 ? (
        <p>
          Try fewer letters, a value such as <span className="font-mono">4k7</span>, or the number on the bag. A part
          that is not in the catalogue yet is added under{' '}
          <Link href="/parts" className="text-copper underline underline-offset-2">
            Parts
          </Link>
          .
        </p>
      ) : (
        <ul className="border-t border-ink" aria-label="What might be meant">
          {hits.map((hit) => (
            <li key={`${hit.what} ${hit.href}`} className="border-b border-hair">
              <Link
                href={hit.href}
                className="grid min-h-12 grid-cols-[5rem_1fr] items-center gap-x-4 px-1 py-1.5 hover:bg-copper-wash"
              >
                <span className="text-small text-soft">{hit.what}</span>
                <span className="min-w-0">
                  <span className="font-semibold">{hit.title}</span> <span className="text-soft">{hit.detail}</span>
                </span>
              </Link>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
