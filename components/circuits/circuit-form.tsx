'use client';
/** A new circuit: name, what it is, the rails it runs on. Client: it reads the rails as they are typed. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { createCircuit } from '@/lib/circuits/create-circuit';
import { RailsError, readRails } from '@/lib/electronics/stand-in/read-rails';

export function CircuitForm() {
  const router = useRouter();
  const formId = useId();
  const [name, setName] = useState('');
  const [description, setDescription] = useState('');
  const [rails, setRails] = useState('±12');
  const [railsWrong, setRailsWrong] = useState<string | undefined>();
  const create = useCommand<typeof createCircuit>('POST /circuits');

  function submit(event: FormEvent) {
    event.preventDefault();
    let railsVolts: number[] = [];
    try {
      railsVolts = rails.trim() === '' ? [] : readRails(rails);
      setRailsWrong(undefined);
    } catch (error) {
      if (!(error instanceof RailsError)) throw error;
      setRailsWrong(error.message);
      return;
    }
    create.mutate({ name, description, railsVolts }, { onSuccess: ({ id }) => router.push(`/circuits/${id}`) });
  }

  return (
    <Dialog
      title="New circuit"
      description="One design; its parts lists become revisions of it."
      trigger={<Button kind="primary">New circuit</Button>}
      actions={
        <>
          <DialogClose>
            <Button kind="quiet">Leave it</Button>
          </DialogClose>
          <Button type="submit" form={formId} kind="primary" busy={create.isPending} busyWord="Making …">
            Make the circuit
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
          label="Name"
          required
          value={name}
          maxLength={100}
          onChange={(event) => setName(event.target.value)}
        />
        <TextArea
          label="What it is"
          optional
          rows={2}
          value={description}
          onChange={(event) => setDescription(event.target.value)}
        />
        <TextField
          label="Supply rails"
          optional
          mono
          hint="As on the drawing: ±12, +12,−5 or +5. Stand-ins are checked against them."
          value={rails}
          error={railsWrong}
          onChange={(event) => setRails(event.target.value)}
        />
      </form>
    </Dialog>
  );
}
