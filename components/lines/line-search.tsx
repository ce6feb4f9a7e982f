'use client';
/** The words that lines must hold and how many units are to be made. Client: it writes them into the address. */
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, TextField } from '@/components/ui/field';

export function LineSearch({ initial, units }: { readonly initial: string; readonly units: number }) {
  const router = useRouter();
  const pathname = usePathname();
  const parameters = useSearchParams();
  const [text, setText] = useState(initial);
  const [count, setCount] = useState(String(units));
  function submit(event: FormEvent) {
    event.preventDefault();
    const next = new URLSearchParams(parameters);
    if (text.trim() === '') next.delete('search');
    else next.set('search', text.trim());
    if (/^[1-9]\d{0,3}$/.test(count) && count !== '1') next.set('units', count);
    else next.delete('units');
    router.push(`${pathname}?${next}`, { scroll: false });
  }
  return (
    <form onSubmit={submit} role="search" className="mb-3 flex flex-wrap items-end gap-3 print:hidden">
      <div className="w-56 max-sm:flex-1">
        <TextField label="Find a line" optional value={text} onChange={(event) => setText(event.target.value)} />
      </div>
      <div className="w-24">
        <NumberField label="Units" value={count} onChange={(event) => setCount(event.target.value)} />
      </div>
      <Button type="submit">Show</Button>
    </form>
  );
}
