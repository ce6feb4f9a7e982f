import type { Metadata } from 'next';
import Link from 'next/link';
import { LookOf } from '@/components/drawings/look-of';
import { kindWord } from '@/components/lines/line-words';
import { PartForm } from '@/components/parts/part-form';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { CheckboxField, SelectField, TextField } from '@/components/ui/field';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pages } from '@/components/ui/pager';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { ask } from '@/lib/api/ask';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { listParts } from '@/lib/stores/list-parts';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Parts' };

const SIZE = 50;

interface Asked {
  readonly page?: string;
  readonly search?: string;
  readonly kind?: string;
  readonly low?: string;
}

export default async function PartsPage({ searchParams }: { readonly searchParams: Promise<Asked> }) {
  const asked = await searchParams;
  const page = Math.max(1, Number(asked.page) || 1);
  const kind = PART_KINDS.find((one) => one === asked.kind);
  const search = String(asked.search ?? '').trim();
  const low = asked.low === 'on';
  const [{ rows, total }, me] = await Promise.all([
    ask(listParts, {
      page,
      size: SIZE,
      ...(search === '' ? {} : { search }),
      ...(kind === undefined ? {} : { kind }),
      ...(low ? { belowReorderPoint: 'true' as const } : {}),
      sort: kind === undefined ? 'name' : 'value',
    }),
    ask(whoAmI, {}),
  ]);
  const mayWrite = me.roles.some((role) => role === 'storekeeper' || role === 'lead');
  const address = (to: number) => {
    const query = new URLSearchParams({ page: String(to) });
    if (search !== '') query.set('search', search);
    if (kind !== undefined) query.set('kind', kind);
    if (low) query.set('low', 'on');
    return `/parts?${query}`;
  };
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title="Parts"
        facts={[
          <>
            <Strong mono>{total}</Strong> {search === '' && kind === undefined && !low ? 'in the catalogue' : 'found'}
          </>,
        ]}
        actions={mayWrite ? <PartForm /> : undefined}
      />
      <form role="search" className="mb-4 flex flex-wrap items-end gap-3">
        <div className="w-64 max-sm:w-full">
          <TextField
            label="Name, number or value"
            optional
            mono
            name="search"
            defaultValue={search}
            placeholder="TL072, 4k7 1%, 100n"
          />
        </div>
        <div className="w-44">
          <SelectField
            label="Kind"
            name="kind"
            defaultValue={kind ?? ''}
            options={[{ value: '', label: 'all' }, ...PART_KINDS.map((one) => ({ value: one, label: kindWord(one) }))]}
          />
        </div>
        <div className="pb-2">
          <CheckboxField label="below its reorder point" name="low" defaultChecked={low} />
        </div>
        <Button type="submit">Show</Button>
      </form>
      {rows.length === 0 ? (
        <EmptyState title="No part fits">Try fewer words, or a value such as 4k7.</EmptyState>
      ) : (
        <Table label="Parts" stacked>
          <TableHead>
            <HeadCell>Part</HeadCell>
            <HeadCell>Kind</HeadCell>
            <HeadCell>Look for</HeadCell>
            <HeadCell number>Free</HeadCell>
            <HeadCell number>On hand</HeadCell>
            <HeadCell number>On order</HeadCell>
            <HeadCell number>Reorder at</HeadCell>
            <HeadCell>Bins</HeadCell>
          </TableHead>
          <TableBody>
            {rows.map((one) => (
              <TableRow key={one.id}>
                <Cell label="Part">
                  <Link href={`/parts/${one.id}`} className="font-semibold text-copper hover:underline">
                    {one.name}
                  </Link>
                  {one.description === '' ? null : (
                    <span className="block text-small text-soft">{one.description}</span>
                  )}
                </Cell>
                <Cell label="Kind">{kindWord(one.kind)}</Cell>
                <Cell label="Look for">
                  <LookOf part={one} />
                </Cell>
                <Cell label="Free" number>
                  {one.reorderPoint !== null && one.free < one.reorderPoint ? (
                    <strong className="text-oxide">{one.free}</strong>
                  ) : (
                    one.free
                  )}
                </Cell>
                <Cell label="On hand" number>
                  {one.onHand}
                </Cell>
                <Cell label="On order" number>
                  {one.onOrder}
                </Cell>
                <Cell label="Reorder at" number>
                  {one.reorderPoint ?? '–'}
                </Cell>
                <Cell label="Bins" mono>
                  <span className="text-small">{one.bins.slice(0, 3).join(', ')}</span>
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      <Pages page={page} size={SIZE} total={total} what="parts" hrefOf={address} />
    </>
  );
}
