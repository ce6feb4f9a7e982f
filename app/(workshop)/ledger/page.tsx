import type { Metadata } from 'next';
import Link from 'next/link';
import { MovementsTable, movementWord } from '@/components/stores/movements-table';
import { WORKSHOP_LINKS } from '@/components/workshop/workshop-links';
import { AreaLinks } from '@/components/shell/area-links';
import { Button, ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { SelectField, TextField } from '@/components/ui/field';
import { PageTitle } from '@/components/ui/page-title';
import { ask } from '@/lib/api/ask';
import { listMovements } from '@/lib/stores/list-movements';

export const metadata: Metadata = { title: 'Ledger' };

const SIZE = 60;
const KINDS = ['receipt', 'pick', 'return', 'move', 'count', 'scrap', 'opening'] as const;
const UUID = /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;
const DAY = /^\d{4}-\d{2}-\d{2}$/;
const PLACES = ['partId', 'binId', 'lotId', 'batchId', 'personId'] as const;

type Asked = Partial<Record<(typeof PLACES)[number] | 'before' | 'kind' | 'from' | 'to', string>>;

export default async function LedgerPage({ searchParams }: { readonly searchParams: Promise<Asked> }) {
  const asked = await searchParams;
  const places = Object.fromEntries(
    PLACES.flatMap((name) => (UUID.test(asked[name] ?? '') ? [[name, asked[name]]] : [])),
  );
  const kind = KINDS.find((one) => one === asked.kind);
  const days = {
    ...(DAY.test(asked.from ?? '') ? { from: asked.from } : {}),
    ...(DAY.test(asked.to ?? '') ? { to: asked.to } : {}),
  };
  const before = /^\d{1,15}$/.test(asked.before ?? '') ? Number(asked.before) : undefined;
  const { rows, before: further } = await ask(listMovements, {
    size: SIZE,
    ...places,
    ...days,
    ...(kind === undefined ? {} : { kind: [kind] }),
    ...(before === undefined ? {} : { before }),
  });
  const [first] = rows;
  const about = places.partId !== undefined ? first?.partName : places.binId !== undefined ? first?.binCode : undefined;
  const filters = new URLSearchParams(
    Object.entries({ ...places, ...days, ...(kind === undefined ? {} : { kind }) }).flatMap(([name, value]) =>
      value === undefined ? [] : [[name, value]],
    ),
  );
  const narrowed = [...filters].length > 0;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Workshop" links={WORKSHOP_LINKS} />}
        title="Ledger"
        {...(about === undefined ? {} : { remainder: `of ${about}` })}
        facts={['Every unit that ever moved has a line here; none is changed or taken away.']}
      />
      <form className="mb-4 flex flex-wrap items-end gap-3 print:hidden">
        {Object.entries(places).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <div className="w-44">
          <SelectField
            label="What happened"
            name="kind"
            defaultValue={kind ?? ''}
            options={[
              { value: '', label: 'anything' },
              ...KINDS.map((one) => ({ value: one, label: movementWord(one) })),
            ]}
          />
        </div>
        <div className="w-40">
          <TextField label="From" type="date" name="from" defaultValue={days.from ?? ''} />
        </div>
        <div className="w-40">
          <TextField label="To" type="date" name="to" defaultValue={days.to ?? ''} />
        </div>
        <Button type="submit">Show</Button>
        {narrowed ? (
          <Link href="/ledger" className="inline-flex min-h-9 items-center text-copper hover:underline">
            All of it
          </Link>
        ) : null}
      </form>
      {rows.length === 0 ? (
        <EmptyState title="No line fits">
          {narrowed
            ? 'Show all of it, or choose another day.'
            : 'The first receipt, or opening stock, writes the first line.'}
        </EmptyState>
      ) : (
        <MovementsTable movements={rows} label="Movements, newest first" />
      )}
      {further === null ? null : (
        <p className="mt-4">
          <ButtonLink href={`/ledger?${new URLSearchParams([...filters, ['before', String(further)]])}`}>
            Earlier lines
          </ButtonLink>
        </p>
      )}
    </>
  );
}
