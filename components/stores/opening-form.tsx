'use client';
/** Stock that is already on the shelf when its part is entered. Client: it holds what is typed. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { openingStock } from '@/lib/stores/opening-stock';
import { BinChoice, type ChosenBin } from './bin-choice';

export function OpeningForm({ partId }: { readonly partId: string }) {
  const router = useRouter();
  const say = useSay();
  const [bin, setBin] = useState<ChosenBin | null>(null);
  const [quantity, setQuantity] = useState('');
  const [cost, setCost] = useState('');
  const [lotCode, setLotCode] = useState('');
  const [unchosen, setUnchosen] = useState(false);
  const enter = useCommand<typeof openingStock>('POST /movements/opening');
  function submit(event: FormEvent) {
    event.preventDefault();
    setUnchosen(bin === null);
    if (bin === null) return;
    enter.mutate(
      {
        entries: [
          {
            partId,
            binId: bin.id,
            quantity: Number(quantity),
            ...(cost === '' ? {} : { unitCost: cost.replace(',', '.') }),
            ...(lotCode === '' ? {} : { lotCode }),
          },
        ],
      },
      {
        onSuccess: () => {
          say(`${quantity} entered in ${bin.code}`);
          setQuantity('');
          setBin(null);
          router.refresh();
        },
      },
    );
  }
  return (
    <form onSubmit={submit} className="flex max-w-[40rem] flex-col gap-3">
      {enter.error || unchosen ? (
        <Notice tone="stop" announce title="Nothing was entered">
          {unchosen ? 'Choose the bin it lies in.' : enter.error?.details.detail}
        </Notice>
      ) : null}
      <div className="grid items-start gap-3 sm:grid-cols-4">
        <BinChoice label="Bin" chosen={bin} onChoose={setBin} />
        <NumberField label="How many" required value={quantity} onChange={(event) => setQuantity(event.target.value)} />
        <NumberField
          label="Cost of one"
          optional
          whole={false}
          value={cost}
          onChange={(event) => setCost(event.target.value)}
        />
        <TextField
          label="Lot code"
          optional
          mono
          value={lotCode}
          onChange={(event) => setLotCode(event.target.value)}
        />
      </div>
      <div>
        <Button type="submit" busy={enter.isPending} busyWord="Entering …">
          Enter the stock
        </Button>
      </div>
    </form>
  );
}
