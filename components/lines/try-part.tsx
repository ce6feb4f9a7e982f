'use client';
/** Any other part of the catalogue, looked for by name, number or value, to be weighed for the line. Client: it searches. */
import Link from 'next/link';
import { useDeferredValue, useState } from 'react';
import { TextField } from '@/components/ui/field';
import { useAnswer } from '@/lib/api/client';
import type { listParts } from '@/lib/stores/list-parts';

const MOST_SHOWN = 8;

export function TryPart({ hrefStart }: { readonly hrefStart: string }) {
  const [text, setText] = useState('');
  const search = useDeferredValue(text.trim());
  const { data, error } = useAnswer<typeof listParts>(
    'GET /parts',
    { search, size: MOST_SHOWN },
    { enabled: search.length >= 2 },
  );
  return (
    <div className="mt-4">
      <TextField
        label="Try another part"
        optional
        mono
        value={text}
        placeholder="BC547, 100n, 4k7 …"
        onChange={(event) => setText(event.target.value)}
      />
      {error ? <p className="text-small text-oxide">{error.details.detail}</p> : null}
      {search.length >= 2 && data ? (
        <ul className="mt-1 border-t border-hair" aria-label="Parts found">
          {data.rows.length === 0 ? (
            <li className="py-1 text-small text-soft">No part of that name or value.</li>
          ) : null}
          {data.rows.map((row) => (
            <li key={row.id} className="border-b border-hair">
              <Link
                href={`${hrefStart}${row.id}`}
                scroll={false}
                className="flex min-h-9 items-baseline justify-between gap-3 py-1 hover:bg-copper-wash max-sm:min-h-11"
              >
                <span className="min-w-0 break-words text-copper">{row.name}</span>
                <span className="font-mono text-small whitespace-nowrap text-soft">{row.free} free</span>
              </Link>
            </li>
          ))}
        </ul>
      ) : null}
    </div>
  );
}
