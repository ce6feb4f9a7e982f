'use client';
/** Corrections of one line in its draft; its use also when frozen. Client: a change is sent when its field is left. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckboxField, NumberField, SelectField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { changeLine } from '@/lib/circuits/change-line';
import type { dropLine } from '@/lib/circuits/drop-line';
import { USE_WORDS } from './line-words';

interface EditedLine {
  readonly id: string;
  readonly revisionState: 'draft' | 'frozen';
  readonly designators: readonly string[];
  readonly quantity: number;
  readonly fitted: boolean;
  readonly text: string;
  readonly use: string | null;
}

export function LineForm({ line, backHref }: { readonly line: EditedLine; readonly backHref: string }) {
  const router = useRouter();
  const say = useSay();
  const [text, setText] = useState(line.text);
  const [designators, setDesignators] = useState(line.designators.join(', '));
  const [quantity, setQuantity] = useState(String(line.quantity));
  const [fitted, setFitted] = useState(line.fitted);
  const [use, setUse] = useState(line.use ?? '');
  const change = useCommand<typeof changeLine>('PATCH /lines/{lineId}');
  const drop = useCommand<typeof dropLine>('DELETE /lines/{lineId}');
  const draft = line.revisionState === 'draft';
  const problem = change.error ?? drop.error;

  function submit(event: FormEvent) {
    event.preventDefault();
    const named = designators.split(/[\s,;]+/).filter((one) => one !== '');
    const known = USE_WORDS.find(([word]) => word === use)?.[0];
    change.mutate(
      {
        lineId: line.id,
        ...(use === (line.use ?? '') ? {} : { use: known === undefined || known === '' ? null : known }),
        ...(draft && text !== line.text ? { text } : {}),
        ...(draft && named.join() !== line.designators.join() ? { designators: named } : {}),
        ...(draft && Number(quantity) !== line.quantity ? { quantity: Number(quantity) } : {}),
        ...(draft && fitted !== line.fitted ? { fitted } : {}),
      },
      {
        onSuccess: () => {
          say('The line was changed and matched again');
          router.refresh();
        },
      },
    );
  }
  return (
    <details className="mt-4 border-t border-rule pt-3">
      <summary className="min-h-8 cursor-pointer font-bold max-sm:min-h-11">Correct this line</summary>
      <form onSubmit={submit} className="mt-2 flex flex-col gap-3">
        {problem ? (
          <Notice tone="stop" announce title={problem.details.title}>
            {problem.details.detail}
          </Notice>
        ) : null}
        {draft ? (
          <>
            <TextField label="What it asks for" mono value={text} onChange={(event) => setText(event.target.value)} />
            <TextField
              label="Designators"
              mono
              optional
              value={designators}
              onChange={(event) => setDesignators(event.target.value)}
            />
            <NumberField
              label="Quantity a unit"
              value={quantity}
              onChange={(event) => setQuantity(event.target.value)}
            />
            <CheckboxField label="fitted" checked={fitted} onChange={(event) => setFitted(event.target.checked)} />
          </>
        ) : (
          <p className="text-small text-soft">
            The revision is frozen; copy it to change its parts. What the line is used for may still be said.
          </p>
        )}
        <SelectField
          label="Used for"
          hint="The checks are stricter where it matters."
          value={use}
          options={USE_WORDS.map(([value, label]) => ({ value, label }))}
          onChange={(event) => setUse(event.target.value)}
        />
        <div className="flex flex-wrap gap-2.5">
          <Button type="submit" busy={change.isPending} busyWord="Changing …">
            Change the line
          </Button>
          {draft ? (
            <Button
              kind="danger"
              busy={drop.isPending}
              onClick={() =>
                drop.mutate(
                  { lineId: line.id },
                  {
                    onSuccess: () => {
                      say('The line was taken out');
                      router.push(backHref);
                      router.refresh();
                    },
                  },
                )
              }
            >
              Take it out
            </Button>
          ) : null}
        </div>
      </form>
    </details>
  );
}
