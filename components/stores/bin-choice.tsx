'use client';
/** Choosing a bin by typing or scanning its code. Client: it searches; a whole code chooses itself. */
import { useDeferredValue, useState } from 'react';
import { TextField } from '@/components/ui/field';
import { useAnswer } from '@/lib/api/client';
import type { listBins } from '@/lib/stores/list-bins';

const MOST_SHOWN = 6;

export interface ChosenBin {
  readonly id: string;
  readonly code: string;
}

export function BinChoice({
  label,
  chosen,
  onChoose,
  hideLabel = false,
}: {
  readonly label: string;
  readonly chosen: ChosenBin | null;
  readonly onChoose: (bin: ChosenBin | null) => void;
  readonly hideLabel?: boolean;
}) {
  const [text, setText] = useState('');
  const search = useDeferredValue(text.trim().toUpperCase());
  const { data } = useAnswer<typeof listBins>(
    'GET /bins',
    { search, size: MOST_SHOWN },
    { enabled: chosen === null && search !== '' },
  );
  return (
    <div>
      <TextField
        label={label}
        hideLabel={hideLabel}
        mono
        placeholder="A-01-1"
        value={chosen?.code ?? text}
        onChange={(event) => {
          onChoose(null);
          setText(event.target.value);
        }}
        onKeyDown={(event) => {
          const exact = data?.rows.find((row) => row.code === search);
          if (event.key !== 'Enter' || !exact) return;
          event.preventDefault();
          onChoose({ id: exact.id, code: exact.code });
        }}
      />
      {chosen === null && search !== '' && data ? (
        <ul className="border-x border-b border-rule bg-sheet" aria-label={`${label}: found`}>
          {data.rows.map((row) => (
            <li key={row.id}>
              <button
                type="button"
                className="flex min-h-9 w-full items-baseline justify-between gap-3 px-2.5 py-1 text-left hover:bg-copper-wash max-sm:min-h-11"
                onClick={() => onChoose({ id: row.id, code: row.code })}
              >
                <span className="font-mono text-copper">{row.code}</span>
                <span className="truncate text-small text-soft">{row.contents[0]?.name ?? 'empty'}</span>
              </button>
            </li>
          ))}
          {data.rows.length === 0 ? <li className="px-2.5 py-1 text-small text-soft">No bin of that code.</li> : null}
        </ul>
      ) : null}
    </div>
  );
}
