import type { Metadata } from 'next';
import Link from 'next/link';
import { ReceiveForm } from '@/components/stores/receive-form';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle } from '@/components/ui/page-title';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { receiptProposal } from '@/lib/stores/receipt-proposal';

export const metadata: Metadata = { title: 'Receive an order' };

export default async function ReceiveOrderPage({ params }: { readonly params: Promise<{ orderId: string }> }) {
  const { orderId } = await params;
  const proposal = await ask(receiptProposal, { orderId });
  const missing = proposal.lines.filter((line) => line.missing > 0);
  const open = proposal.state === 'sent' || proposal.state === 'part-received';
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title={`Receive ${proposal.number}`}
        remainder={proposal.supplierName}
        facts={[
          <StateWord key="state" state={proposal.state} />,
          <>
            {missing.length} of {proposal.lines.length} lines to come
          </>,
        ]}
        actions={
          <Link href={`/orders/${orderId}`} className="text-copper hover:underline">
            The order
          </Link>
        }
      />
      {open && missing.length > 0 ? (
        <ReceiveForm orderId={orderId} expected={missing} />
      ) : (
        <EmptyState
          title={open ? 'Everything is in' : 'Nothing can be received on it'}
          actions={<ButtonLink href="/receive">What is on its way</ButtonLink>}
        >
          {open
            ? 'All its bags are in their bins.'
            : 'An order is received once it was sent, until it is closed or cancelled.'}
        </EmptyState>
      )}
    </>
  );
}
