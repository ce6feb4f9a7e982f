'use client';
/** A supplier's details, new or changed. Client: it holds what is typed. Money is typed in whole units with cents. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { changeSupplier, createSupplier } from '@/lib/purchasing/suppliers';

export interface SupplierFacts {
  readonly id: string;
  readonly version: number;
  readonly name: string;
  readonly email: string;
  readonly address: string;
  readonly currency: string;
  readonly paymentAccount: string | null;
  readonly postageMinor: number;
  readonly postageFreeFromMinor: number | null;
  readonly minimumOrderMinor: number;
  readonly leadTimeDays: number;
}

const toText = (minor: number | null): string => (minor === null || minor === 0 ? '' : (minor / 100).toFixed(2));
/** Cents of `4.90`, or NaN where it is no amount; the server says so in words. */
const toMinor = (text: string): number => (text.trim() === '' ? 0 : Math.round(Number(text.replace(',', '.')) * 100));

export function SupplierForm({ supplier }: { readonly supplier: SupplierFacts | null }) {
  const router = useRouter();
  const say = useSay();
  const [typed, setTyped] = useState({
    name: supplier?.name ?? '',
    email: supplier?.email ?? '',
    address: supplier?.address ?? '',
    currency: supplier?.currency ?? 'EUR',
    paymentAccount: supplier?.paymentAccount ?? '',
    postage: toText(supplier?.postageMinor ?? null),
    freeFrom: toText(supplier?.postageFreeFromMinor ?? null),
    minimum: toText(supplier?.minimumOrderMinor ?? null),
    days: String(supplier?.leadTimeDays ?? 7),
  });
  const create = useCommand<typeof createSupplier>('POST /suppliers');
  const change = useCommand<typeof changeSupplier>('PUT /suppliers/{supplierId}');
  const problem = create.error ?? change.error;
  const put = (field: keyof typeof typed) => (event: { target: { value: string } }) =>
    setTyped((before) => ({ ...before, [field]: event.target.value }));

  function submit(event: FormEvent) {
    event.preventDefault();
    const fields = {
      name: typed.name,
      email: typed.email,
      address: typed.address,
      currency: typed.currency,
      paymentAccount: typed.paymentAccount === '' ? null : typed.paymentAccount,
      postageMinor: toMinor(typed.postage),
      postageFreeFromMinor: typed.freeFrom === '' ? null : toMinor(typed.freeFrom),
      minimumOrderMinor: toMinor(typed.minimum),
      leadTimeDays: Number(typed.days),
    };
    if (supplier === null) create.mutate(fields, { onSuccess: ({ id }) => router.push(`/suppliers/${id}`) });
    else {
      change.mutate(
        { supplierId: supplier.id, version: supplier.version, ...fields },
        {
          onSuccess: () => {
            say(`${typed.name} was changed`);
            router.refresh();
          },
        },
      );
    }
  }
  return (
    <form onSubmit={submit} className="flex max-w-[40rem] flex-col gap-4">
      {problem ? (
        <Notice tone="stop" announce title={problem.details.title}>
          {problem.details.detail}
        </Notice>
      ) : null}
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="Name" required value={typed.name} onChange={put('name')} />
        <TextField label="E-mail for orders" type="email" required value={typed.email} onChange={put('email')} />
      </div>
      <TextArea label="Address" optional rows={2} value={typed.address} onChange={put('address')} />
      <div className="grid gap-4 sm:grid-cols-3">
        <TextField label="Currency" mono required maxLength={3} value={typed.currency} onChange={put('currency')} />
        <NumberField label="Postage" whole={false} optional value={typed.postage} onChange={put('postage')} />
        <NumberField label="Free from" whole={false} optional value={typed.freeFrom} onChange={put('freeFrom')} />
        <NumberField label="Smallest order" whole={false} optional value={typed.minimum} onChange={put('minimum')} />
        <NumberField label="Delivery, days" value={typed.days} onChange={put('days')} />
        <TextField
          label="Account for card payments"
          mono
          optional
          value={typed.paymentAccount}
          onChange={put('paymentAccount')}
        />
      </div>
      <div>
        <Button
          type="submit"
          kind={supplier === null ? 'primary' : 'secondary'}
          busy={create.isPending || change.isPending}
          busyWord="Saving …"
        >
          {supplier === null ? 'Add the supplier' : 'Save the details'}
        </Button>
      </div>
    </form>
  );
}
