'use client';
/** Choosing one part of the catalogue by typing; what was found stands under the field. Client: it searches. */
import { useDeferredValue, useState } from 'react';
import { TextField } from '@/components/ui/field';
import { useAnswer } from '@/lib/api/client';
import type { listParts } from '@/lib/stores/list-parts';

const MOST_SHOWN = 6;

export interface ChosenPart {
  readonly id: string;
  readonly name: string;
}

export function PartChoice({
  label,
  chosen,
  onChoose,
}: {
  readonly label: string;
  readonly chosen: ChosenPart | null;
  readonly onChoose: (part: ChosenPart | null) => void;
}) {
  const [text, setText] = useState('');
  const search = useDeferredValue(text.trim());
  const { data } = useAnswer<typeof listParts>(
    'GET /parts',
    { search, size: MOST_SHOWN },
    { enabled: chosen === null && search.length >= 2 },
  );
  return (
    <div>
      <TextField
        label={label}
        mono
        value={chosen?.name ?? text}
        onChange={(event) => {
          onChoose(null);
          setText(event.target.value);
        }}
      />
      {chosen === null && search.length >= 2 && data ? (
        <ul className="border-x border-b border-rule bg-sheet" aria-label={`${label}: found`}>
          {data.rows.map((row) => (
            <li key={row.id}>
              <button
                type="button"
                className="flex min-h-9 w-full items-baseline justify-between gap-3 px-2.5 py-1 text-left hover:bg-copper-wash max-sm:min-h-11"
                onClick={() => onChoose({ id: row.id, name: row.name })}
              >
                <span className="text-copper">{row.name}</span>
                <span className="font-mono text-small text-soft">{row.bins.slice(0, 2).join(', ')}</span>
              </button>
            </li>
          ))}
          {data.rows.length === 0 ? <li className="px-2.5 py-1 text-small text-soft">No part of that name.</li> : null}
        </ul>
      ) : null}
    </div>
  );
}
