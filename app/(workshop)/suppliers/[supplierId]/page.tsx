import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { unitPriceText } from '@/components/purchasing/money';
import { OfferForm } from '@/components/purchasing/offer-form';
import { PURCHASING_LINKS } from '@/components/purchasing/purchasing-links';
import { SupplierForm } from '@/components/purchasing/supplier-form';
import { AreaLinks } from '@/components/shell/area-links';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pages } from '@/components/ui/pager';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { ask } from '@/lib/api/ask';
import { listOffers, listSuppliers } from '@/lib/purchasing/suppliers';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Supplier' };

const SIZE = 50;
const MOST_SUPPLIERS = 200;

export default async function SupplierPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ supplierId: string }>;
  readonly searchParams: Promise<{ page?: string }>;
}) {
  const { supplierId } = await params;
  const page = Math.max(1, Number((await searchParams).page) || 1);
  const [suppliers, offers, me] = await Promise.all([
    ask(listSuppliers, { size: MOST_SUPPLIERS }),
    ask(listOffers, { supplierId, page, size: SIZE }),
    ask(whoAmI, {}),
  ]);
  const supplier = suppliers.rows.find((one) => one.id === supplierId);
  if (!supplier) notFound();
  const mayWrite = me.roles.some((role) => role === 'buyer' || role === 'lead');
  const address = (to: number) => `/suppliers/${supplierId}?page=${to}`;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Purchasing" links={PURCHASING_LINKS} />}
        title={supplier.name}
        facts={[
          <>
            <Strong mono>{offers.total}</Strong> offers
          </>,
          <span key="mail" className="font-mono break-all">
            {supplier.email}
          </span>,
        ]}
      />
      <Section title="Offers">
        {offers.rows.length === 0 ? (
          <EmptyState title="No offer yet">An offer is what this supplier asks for a part, with its breaks.</EmptyState>
        ) : (
          <Table label={`Offers of ${supplier.name}`} stacked>
            <TableHead>
              <HeadCell>Part</HeadCell>
              <HeadCell>Code</HeadCell>
              <HeadCell>Prices</HeadCell>
              <HeadCell number>Multiple</HeadCell>
              <HeadCell number>Least</HeadCell>
              <HeadCell number>Days</HeadCell>
            </TableHead>
            <TableBody>
              {offers.rows.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="Part">
                    <Link href={`/parts/${one.partId}`} className="text-copper hover:underline">
                      {one.partName}
                    </Link>
                  </Cell>
                  <Cell label="Code" mono>
                    {one.supplierCode}
                  </Cell>
                  <Cell label="Prices">
                    <span className="font-mono text-small">
                      {one.breaks
                        .map((step) => `${step.fromQuantity}+ ${unitPriceText(step.unitPrice, one.currency)}`)
                        .join('  ')}
                    </span>
                  </Cell>
                  <Cell label="Multiple" number>
                    {one.orderMultiple}
                  </Cell>
                  <Cell label="Least" number>
                    {one.minimumQuantity}
                  </Cell>
                  <Cell label="Days" number>
                    {one.leadTimeDays}
                  </Cell>
                </TableRow>
              ))}
            </TableBody>
          </Table>
        )}
        <Pages page={page} size={SIZE} total={offers.total} what="offers" hrefOf={address} />
      </Section>
      {mayWrite ? (
        <>
          <Section title="New or changed offer">
            <OfferForm supplierId={supplierId} />
          </Section>
          <Section title="Details">
            <SupplierForm key={supplier.version} supplier={supplier} />
          </Section>
        </>
      ) : null}
    </>
  );
}
