'use client';
/** What a supplier asks for a part: code, multiple, smallest quantity, prices by quantity. Client: it holds what is typed. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { type ChosenPart, PartChoice } from '@/components/workshop/part-choice';
import { useCommand } from '@/lib/api/client';
import type { setOffer } from '@/lib/purchasing/suppliers';

const MOST_BREAKS = 12;

export function OfferForm({ supplierId }: { readonly supplierId: string }) {
  const router = useRouter();
  const say = useSay();
  const [part, setPart] = useState<ChosenPart | null>(null);
  const [code, setCode] = useState('');
  const [multiple, setMultiple] = useState('1');
  const [least, setLeast] = useState('1');
  const [breaks, setBreaks] = useState([{ from: '1', price: '' }]);
  const [unchosen, setUnchosen] = useState(false);
  const set = useCommand<typeof setOffer>('PUT /suppliers/{supplierId}/offers');

  function submit(event: FormEvent) {
    event.preventDefault();
    setUnchosen(part === null);
    if (part === null) return;
    set.mutate(
      {
        supplierId,
        partId: part.id,
        supplierCode: code,
        orderMultiple: Number(multiple),
        minimumQuantity: Number(least),
        breaks: breaks
          .filter((one) => one.price !== '')
          .map((one) => ({ fromQuantity: Number(one.from), unitPrice: one.price.replace(',', '.') })),
      },
      {
        onSuccess: () => {
          say(`The offer for ${part.name} is kept`);
          setPart(null);
          setCode('');
          setBreaks([{ from: '1', price: '' }]);
          router.refresh();
        },
      },
    );
  }
  const changeBreak = (index: number, field: 'from' | 'price', value: string) =>
    setBreaks((before) => before.map((one, place) => (place === index ? { ...one, [field]: value } : one)));
  return (
    <form onSubmit={submit} className="flex max-w-[40rem] flex-col gap-4">
      {set.error || unchosen ? (
        <Notice tone="stop" announce title="The offer was not kept">
          {unchosen ? 'Choose the part from those found.' : set.error?.details.detail}
        </Notice>
      ) : null}
      <div className="grid gap-4 sm:grid-cols-2">
        <PartChoice label="Part" chosen={part} onChoose={setPart} />
        <TextField
          label="Supplier’s code"
          mono
          required
          value={code}
          onChange={(event) => setCode(event.target.value)}
        />
        <NumberField
          label="Sold in multiples of"
          value={multiple}
          onChange={(event) => setMultiple(event.target.value)}
        />
        <NumberField label="Smallest quantity" value={least} onChange={(event) => setLeast(event.target.value)} />
      </div>
      <fieldset>
        <legend className="text-small font-semibold">Prices</legend>
        {breaks.map((one, index) => (
          <div key={index} className="mt-2 grid grid-cols-2 gap-3">
            <NumberField
              label="From quantity"
              value={one.from}
              onChange={(event) => changeBreak(index, 'from', event.target.value)}
            />
            <NumberField
              label="Each"
              whole={false}
              value={one.price}
              onChange={(event) => changeBreak(index, 'price', event.target.value)}
            />
          </div>
        ))}
        {breaks.length < MOST_BREAKS ? (
          <div className="mt-2">
            <Button
              size="small"
              kind="quiet"
              onClick={() => setBreaks((before) => [...before, { from: '', price: '' }])}
            >
              Another break
            </Button>
          </div>
        ) : null}
      </fieldset>
      <div>
        <Button type="submit" busy={set.isPending} busyWord="Keeping …">
          Keep the offer
        </Button>
      </div>
    </form>
  );
}
