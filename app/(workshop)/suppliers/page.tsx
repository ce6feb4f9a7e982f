import type { Metadata } from 'next';
import Link from 'next/link';
import { money } from '@/components/purchasing/money';
import { PURCHASING_LINKS } from '@/components/purchasing/purchasing-links';
import { SupplierForm } from '@/components/purchasing/supplier-form';
import { AreaLinks } from '@/components/shell/area-links';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { ask } from '@/lib/api/ask';
import { listSuppliers } from '@/lib/purchasing/suppliers';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Suppliers' };

const MOST = 200;

export default async function SuppliersPage() {
  const [{ rows }, me] = await Promise.all([ask(listSuppliers, { size: MOST }), ask(whoAmI, {})]);
  const mayWrite = me.roles.some((role) => role === 'buyer' || role === 'lead');
  return (
    <>
      <PageTitle above={<AreaLinks label="Purchasing" links={PURCHASING_LINKS} />} title="Suppliers" />
      {rows.length === 0 ? (
        <EmptyState title="No supplier yet">Add the first one below, then its offers.</EmptyState>
      ) : (
        <Table label="Suppliers" stacked>
          <TableHead>
            <HeadCell>Supplier</HeadCell>
            <HeadCell>Orders go to</HeadCell>
            <HeadCell number>Offers</HeadCell>
            <HeadCell number>Postage</HeadCell>
            <HeadCell number>Free from</HeadCell>
            <HeadCell number>Smallest order</HeadCell>
            <HeadCell number>Days</HeadCell>
            <HeadCell>Paid</HeadCell>
          </TableHead>
          <TableBody>
            {rows.map((one) => (
              <TableRow key={one.id}>
                <Cell label="Supplier">
                  <Link href={`/suppliers/${one.id}`} className="font-semibold text-copper hover:underline">
                    {one.name}
                  </Link>
                </Cell>
                <Cell label="Orders go to" mono>
                  <span className="break-all">{one.email}</span>
                </Cell>
                <Cell label="Offers" number>
                  {one.offers}
                </Cell>
                <Cell label="Postage" number>
                  {money(one.postageMinor, one.currency)}
                </Cell>
                <Cell label="Free from" number>
                  {one.postageFreeFromMinor === null ? '–' : money(one.postageFreeFromMinor, one.currency)}
                </Cell>
                <Cell label="Smallest" number>
                  {one.minimumOrderMinor === 0 ? '–' : money(one.minimumOrderMinor, one.currency)}
                </Cell>
                <Cell label="Days" number>
                  {one.leadTimeDays}
                </Cell>
                <Cell label="Paid">{one.paymentAccount === null ? 'on account' : 'by card or on account'}</Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      {mayWrite ? (
        <Section title="New supplier">
          <SupplierForm supplier={null} />
        </Section>
      ) : null}
    </>
  );
}
