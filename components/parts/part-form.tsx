'use client';
/** A new part from one line of text, as it would stand in a parts list. Client: it shows what was typed and what is wrong. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { CheckboxField, NumberField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { createPart } from '@/lib/stores/create-part';

export function PartForm() {
  const router = useRouter();
  const formId = useId();
  const [text, setText] = useState('');
  const [name, setName] = useState('');
  const [reorderPoint, setReorderPoint] = useState('');
  const [safety, setSafety] = useState(false);
  const create = useCommand<typeof createPart>('POST /parts');
  function submit(event: FormEvent) {
    event.preventDefault();
    create.mutate(
      {
        text,
        ...(name === '' ? {} : { name }),
        ...(reorderPoint === '' ? {} : { reorderPoint: Number(reorderPoint) }),
        safety,
      },
      { onSuccess: ({ id }) => router.push(`/parts/${id}`) },
    );
  }
  return (
    <Dialog
      title="New part"
      description="One line, as it would stand in a parts list; it is understood the same way."
      trigger={<Button kind="primary">New part</Button>}
      actions={
        <>
          <DialogClose>
            <Button kind="quiet">Leave it</Button>
          </DialogClose>
          <Button type="submit" form={formId} kind="primary" busy={create.isPending} busyWord="Adding …">
            Add the part
          </Button>
        </>
      }
    >
      <form id={formId} onSubmit={submit} className="flex flex-col gap-4">
        {create.error ? (
          <Notice tone="stop" announce title={create.error.details.title}>
            {create.error.details.detail}
          </Notice>
        ) : null}
        <TextField
          label="What it is"
          mono
          required
          hint="Such as 100n X7R 50V, 4k7 1% metal film, TL072CP, BC547B"
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
        <TextField label="Name on the drawer" optional value={name} onChange={(event) => setName(event.target.value)} />
        <NumberField
          label="Reorder point"
          optional
          value={reorderPoint}
          onChange={(event) => setReorderPoint(event.target.value)}
        />
        <CheckboxField
          label="mains, fuse or isolation part"
          hint="Nothing is ever offered in its stead."
          checked={safety}
          onChange={(event) => setSafety(event.target.checked)}
        />
      </form>
    </Dialog>
  );
}
