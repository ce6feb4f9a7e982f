'use client';
/** A new cabinet with all its bins, named after its columns and rows. Client: it holds what is typed. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { NumberField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useCommand } from '@/lib/api/client';
import type { createCabinet } from '@/lib/stores/create-cabinet';

export function CabinetForm() {
  const router = useRouter();
  const formId = useId();
  const [open, setOpen] = useState(false);
  const [typed, setTyped] = useState({ code: '', name: '', room: '', columns: '12', rows: '6' });
  const create = useCommand<typeof createCabinet>('POST /cabinets');
  const put = (field: keyof typeof typed) => (event: { target: { value: string } }) =>
    setTyped((before) => ({ ...before, [field]: event.target.value }));
  function submit(event: FormEvent) {
    event.preventDefault();
    create.mutate(
      {
        code: typed.code.toUpperCase(),
        name: typed.name,
        room: typed.room,
        columns: Number(typed.columns),
        rows: Number(typed.rows),
      },
      {
        onSuccess: ({ id }) => {
          setOpen(false);
          router.push(`/bins?cabinet=${id}`);
          router.refresh();
        },
      },
    );
  }
  return (
    <Dialog
      title="New cabinet"
      description={`Its bins are named ${typed.code === '' ? 'D' : typed.code.toUpperCase()}-01-1 and so on: column, then row.`}
      open={open}
      onOpenChange={setOpen}
      trigger={<Button kind="quiet">New cabinet</Button>}
      actions={
        <>
          <DialogClose>
            <Button kind="quiet">Leave it</Button>
          </DialogClose>
          <Button type="submit" form={formId} kind="primary" busy={create.isPending} busyWord="Making …">
            Make it with its bins
          </Button>
        </>
      }
    >
      <form id={formId} onSubmit={submit} className="grid gap-4 sm:grid-cols-2">
        {create.error ? (
          <div className="sm:col-span-2">
            <Notice tone="stop" announce title={create.error.details.title}>
              {create.error.details.detail}
            </Notice>
          </div>
        ) : null}
        <TextField label="Letter" mono required maxLength={6} value={typed.code} onChange={put('code')} />
        <TextField label="Room" required value={typed.room} onChange={put('room')} />
        <TextField label="What it is" optional value={typed.name} onChange={put('name')} />
        <span />
        <NumberField label="Columns" value={typed.columns} onChange={put('columns')} />
        <NumberField label="Rows" value={typed.rows} onChange={put('rows')} />
      </form>
    </Dialog>
  );
}
