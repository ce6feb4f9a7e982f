'use client';
/** Bins for a count: those that are due stand chosen, others are added by code. Client: it holds the choice. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckboxField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { openCount } from '@/lib/stores/open-count';
import { BinChoice } from './bin-choice';

interface Due {
  readonly id: string;
  readonly code: string;
  readonly why: string;
  readonly content: string;
}

export function OpenCountForm({ due }: { readonly due: readonly Due[] }) {
  const router = useRouter();
  const [bins, setBins] = useState<readonly Due[]>(due);
  const [chosen, setChosen] = useState<ReadonlySet<string>>(() => new Set(due.map((one) => one.id)));
  const [asking, setAsking] = useState(0);
  const open = useCommand<typeof openCount>('POST /counts');
  function submit(event: FormEvent) {
    event.preventDefault();
    open.mutate(
      {
        binIds: bins.filter((one) => chosen.has(one.id)).map((one) => one.id),
        reason: due.some((one) => chosen.has(one.id)) ? 'due bins' : 'chosen bins',
      },
      { onSuccess: ({ id }) => router.push(`/counts/${id}`) },
    );
  }
  function toggle(id: string, on: boolean) {
    setChosen((before) => {
      const after = new Set(before);
      if (on) after.add(id);
      else after.delete(id);
      return after;
    });
  }
  return (
    <form onSubmit={submit} className="max-w-[44rem]">
      {open.error ? (
        <div className="mb-3">
          <Notice tone="stop" announce title={open.error.details.title}>
            {open.error.details.detail}
          </Notice>
        </div>
      ) : null}
      <ul className="border-t border-rule">
        {bins.map((one) => (
          <li key={one.id} className="border-b border-hair py-1.5">
            <CheckboxField
              label={`${one.code}${one.content === '' ? '' : ` (${one.content})`}`}
              hint={one.why}
              checked={chosen.has(one.id)}
              onChange={(event) => toggle(one.id, event.target.checked)}
            />
          </li>
        ))}
      </ul>
      <div className="mt-3 flex flex-wrap items-end gap-3">
        <div className="w-48">
          <BinChoice
            key={asking}
            label="Another bin"
            chosen={null}
            onChoose={(bin) => {
              if (bin === null) return;
              setBins((before) =>
                before.some((one) => one.id === bin.id)
                  ? before
                  : [...before, { ...bin, why: 'chosen now', content: '' }],
              );
              toggle(bin.id, true);
              setAsking((before) => before + 1);
            }}
          />
        </div>
        <Button type="submit" kind="primary" busy={open.isPending} busyWord="Opening …" disabled={chosen.size === 0}>
          Count {chosen.size} {chosen.size === 1 ? 'bin' : 'bins'}
        </Button>
      </div>
    </form>
  );
}
