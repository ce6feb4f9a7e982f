'use client';
/** Moving units of a lot to another bin, or scrapping them with a reason. Client: it holds what is typed. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog, DialogClose } from '@/components/ui/dialog';
import { NumberField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { Act } from '@/components/workshop/act';
import { useCommand } from '@/lib/api/client';
import type { moveStock } from '@/lib/stores/move-stock';
import type { scrapStock } from '@/lib/stores/scrap-stock';
import { BinChoice, type ChosenBin } from './bin-choice';

export function LotActs({
  lotId,
  what,
  free,
}: {
  readonly lotId: string;
  readonly what: string;
  readonly free: number;
}) {
  return (
    <span className="flex flex-wrap gap-2">
      <MoveLot lotId={lotId} what={what} free={free} />
      <Act<typeof scrapStock>
        endpoint="POST /movements/scrap"
        input={{ lotId }}
        word="Scrap"
        busyWord="Scrapping …"
        size="small"
        kind="quiet"
        title={`Scrap ${what}`}
        text={`${free} of them are free; what is reserved can’t be scrapped.`}
        questions={[
          { field: 'quantity', label: 'How many', kind: 'number' },
          { field: 'reason', label: 'Why', kind: 'line' },
        ]}
        said="It is scrapped, with its reason in the ledger"
      />
    </span>
  );
}

function MoveLot({ lotId, what, free }: { readonly lotId: string; readonly what: string; readonly free: number }) {
  const router = useRouter();
  const say = useSay();
  const formId = useId();
  const [open, setOpen] = useState(false);
  const [bin, setBin] = useState<ChosenBin | null>(null);
  const [quantity, setQuantity] = useState(String(free));
  const [unchosen, setUnchosen] = useState(false);
  const move = useCommand<typeof moveStock>('POST /movements/move');
  function submit(event: FormEvent) {
    event.preventDefault();
    setUnchosen(bin === null);
    if (bin === null) return;
    move.mutate(
      { lotId, toBinId: bin.id, quantity: Number(quantity) },
      {
        onSuccess: ({ toBin }) => {
          setOpen(false);
          say(`${quantity} moved to ${toBin}`);
          router.refresh();
        },
      },
    );
  }
  return (
    <Dialog
      title={`Move ${what}`}
      open={open}
      onOpenChange={setOpen}
      trigger={
        <Button size="small" kind="quiet">
          Move
        </Button>
      }
      actions={
        <>
          <DialogClose>
            <Button kind="quiet">Leave it</Button>
          </DialogClose>
          <Button type="submit" form={formId} kind="primary" busy={move.isPending} busyWord="Moving …">
            Move
          </Button>
        </>
      }
    >
      <form id={formId} onSubmit={submit} className="flex flex-col gap-4">
        {move.error || unchosen ? (
          <Notice tone="stop" announce title="Nothing was moved">
            {unchosen ? 'Choose the bin it goes to.' : move.error?.details.detail}
          </Notice>
        ) : null}
        <BinChoice label="To bin" chosen={bin} onChoose={setBin} />
        <NumberField
          label="How many"
          hint={`${free} are free.`}
          value={quantity}
          onChange={(event) => setQuantity(event.target.value)}
        />
      </form>
    </Dialog>
  );
}
