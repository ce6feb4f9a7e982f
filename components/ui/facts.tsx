/** Names and values of one thing, as a description list with hairlines. */
import type { ReactNode } from 'react';

export interface Fact {
  readonly name: ReactNode;
  readonly value: ReactNode;
  /** For values and codes. */
  readonly mono?: boolean;
  /** Where the fact comes from, in small soft type: "datasheet", "common practice". */
  readonly basis?: ReactNode;
}

export function Facts({ facts, columns = 1 }: { readonly facts: readonly Fact[]; readonly columns?: 1 | 2 }) {
  return (
    <dl className={columns === 2 ? 'grid gap-x-8 sm:grid-cols-2' : undefined}>
      {facts.map((fact, index) => (
        <div
          key={index}
          className="grid grid-cols-[minmax(7rem,2fr)_minmax(0,3fr)] gap-x-4 border-b border-hair py-1.5"
        >
          <dt className="text-soft">{fact.name}</dt>
          <dd className={`min-w-0 break-words ${fact.mono ? 'font-mono' : ''}`}>
            {fact.value}
            {fact.basis !== undefined ? <span className="ml-2 font-sans text-fine text-soft">{fact.basis}</span> : null}
          </dd>
        </div>
      ))}
    </dl>
  );
}
