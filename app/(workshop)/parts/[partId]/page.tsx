import type { Metadata } from 'next';
import Link from 'next/link';
import { LookOf } from '@/components/drawings/look-of';
import { designatorText, kindWord } from '@/components/lines/line-words';
import { unitPriceText } from '@/components/purchasing/money';
import { LotActs } from '@/components/stores/lot-acts';
import { MovementsTable } from '@/components/stores/movements-table';
import { OpeningForm } from '@/components/stores/opening-form';
import { StockHistory } from '@/components/stores/stock-history';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { Caution } from '@/components/ui/caution';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { Act } from '@/components/workshop/act';
import { dayText } from '@/components/workshop/clock-time';
import { ask } from '@/lib/api/ask';
import type { changePart } from '@/lib/stores/change-part';
import { getPart } from '@/lib/stores/get-part';
import type { retirePart } from '@/lib/stores/retire-part';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Part' };

export default async function PartPage({ params }: { readonly params: Promise<{ partId: string }> }) {
  const { partId } = await params;
  const [part, me] = await Promise.all([ask(getPart, { partId }), ask(whoAmI, {})]);
  const mayWrite = me.roles.some((role) => role === 'storekeeper' || role === 'lead') && !part.retired;
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title={part.name}
        remainder={part.retired ? 'retired' : kindWord(part.kind)}
        facts={[
          part.description === '' ? null : part.description,
          <>
            <Strong mono>{part.free}</Strong> free of <Strong mono>{part.onHand}</Strong>
          </>,
          part.onOrder > 0 ? (
            <>
              <Strong mono>{part.onOrder}</Strong> on order
            </>
          ) : null,
          part.reorderPoint === null ? null : <>reorder at {part.reorderPoint}</>,
        ]}
        actions={
          mayWrite ? (
            <>
              <Act<typeof retirePart>
                endpoint="POST /parts/{partId}/retire"
                input={{ partId }}
                word="Retire"
                kind="danger"
                title={`Retire ${part.name}`}
                text="It is offered for nothing any more; its history stays."
                said={`${part.name} is retired`}
              />
              <Act<typeof changePart>
                endpoint="PATCH /parts/{partId}"
                input={{ partId, version: part.version }}
                word="Change"
                questions={[
                  { field: 'name', label: 'Name on the drawer', kind: 'line', initial: part.name },
                  {
                    field: 'reorderPoint',
                    label: 'Reorder point',
                    kind: 'number',
                    optional: true,
                    initial: part.reorderPoint === null ? '' : String(part.reorderPoint),
                  },
                  {
                    field: 'reorderQuantity',
                    label: 'Reorder quantity',
                    kind: 'number',
                    optional: true,
                    initial: part.reorderQuantity === null ? '' : String(part.reorderQuantity),
                  },
                ]}
                said="The part was changed"
              />
            </>
          ) : undefined
        }
      />
      <div className="mb-4 flex flex-wrap items-center gap-6">
        <LookOf part={part} scale={1.6} />
        {part.cautions.map((one) => (
          <Caution key={one.code} level={one.level} title={one.says} />
        ))}
      </div>
      <Section title="On the shelf">
        {part.lots.length === 0 ? (
          <EmptyState title="None on the shelf">
            What comes in through a receipt, or is entered below, stands here lot by lot.
          </EmptyState>
        ) : (
          <Table label={`Lots of ${part.name}`} stacked>
            <TableHead>
              <HeadCell>Bin</HeadCell>
              <HeadCell number>On hand</HeadCell>
              <HeadCell number>Reserved</HeadCell>
              <HeadCell>Lot</HeadCell>
              <HeadCell>Received</HeadCell>
              <HeadCell number>Cost of one</HeadCell>
              {mayWrite ? <HeadCell>Do</HeadCell> : null}
            </TableHead>
            <TableBody>
              {part.lots.map((lot) => (
                <TableRow key={lot.lotId}>
                  <Cell label="Bin" mono>
                    <Link href={`/bins?bin=${lot.binId}`} className="font-semibold text-copper hover:underline">
                      {lot.binCode}
                    </Link>
                  </Cell>
                  <Cell label="On hand" number>
                    {lot.onHand}
                  </Cell>
                  <Cell label="Reserved" number>
                    {lot.reserved}
                  </Cell>
                  <Cell label="Lot" mono>
                    <span className="text-small">
                      {lot.lotCode ?? '–'}
                      {lot.dateCode === null ? '' : ` (${lot.dateCode})`}
                    </span>
                  </Cell>
                  <Cell label="Received">{dayText(lot.receivedAt)}</Cell>
                  <Cell label="Cost" number>
                    {lot.unitCost}
                  </Cell>
                  {mayWrite ? (
                    <Cell label="Do">
                      <LotActs
                        lotId={lot.lotId}
                        what={`${part.name} from ${lot.binCode}`}
                        free={lot.onHand - lot.reserved}
                      />
                    </Cell>
                  ) : null}
                </TableRow>
              ))}
            </TableBody>
          </Table>
        )}
        {mayWrite ? (
          <details className="mt-3">
            <summary className="min-h-9 cursor-pointer font-semibold text-copper max-sm:min-h-11">
              Enter opening stock
            </summary>
            <div className="mt-2">
              <OpeningForm partId={partId} />
            </div>
          </details>
        ) : null}
      </Section>
      <div className="mt-7 grid gap-x-10 gap-y-7 lg:grid-cols-3">
        <List title="Promised to" empty="No batch waits for it.">
          {part.promisedTo.map((one) => (
            <li key={one.batchId} className="flex justify-between gap-3 border-b border-hair py-1.5">
              <Link href={`/batches/${one.batchId}`} className="text-copper hover:underline">
                <span className="font-mono">{one.number}</span> {one.circuit}
              </Link>
              <span className="font-mono">{one.quantity}</span>
            </li>
          ))}
        </List>
        <List title="Used in" empty="No line takes it.">
          {part.usedIn.map((one, index) => (
            <li key={index} className="border-b border-hair py-1.5">
              <Link href={`/revisions/${one.revisionId}`} className="text-copper hover:underline">
                {one.circuit} {one.revision}
              </Link>{' '}
              <span className="font-mono text-small text-soft">
                {one.quantity} × {designatorText(one.designators, 3)}
              </span>
            </li>
          ))}
        </List>
        <List title="Offered by" empty="No supplier offers it yet.">
          {part.offers.map((one) => (
            <li key={one.supplierId} className="flex justify-between gap-3 border-b border-hair py-1.5">
              <Link href={`/suppliers/${one.supplierId}`} className="text-copper hover:underline">
                {one.supplierName} <span className="font-mono text-small text-soft">{one.supplierCode}</span>
              </Link>
              <span className="font-mono whitespace-nowrap">from {unitPriceText(one.fromPrice, one.currency)}</span>
            </li>
          ))}
        </List>
      </div>
      {part.stockHistory.length > 1 ? (
        <Section title="Stock over time">
          <StockHistory history={part.stockHistory} />
        </Section>
      ) : null}
      {part.recent.length > 0 ? (
        <Section
          title="Lately"
          actions={
            <Link href={`/ledger?partId=${partId}`} className="text-copper hover:underline">
              All of its ledger
            </Link>
          }
        >
          <MovementsTable movements={part.recent} label={`Latest movements of ${part.name}`} without={['part']} />
        </Section>
      ) : null}
    </>
  );
}

function List({
  title,
  empty,
  children,
}: {
  readonly title: string;
  readonly empty: string;
  readonly children: readonly React.ReactNode[];
}) {
  return (
    <section>
      <h2 className="border-b border-ink pb-1 font-bold">{title}</h2>
      {children.length === 0 ? <p className="py-1.5 text-soft">{empty}</p> : <ul>{children}</ul>}
    </section>
  );
}
