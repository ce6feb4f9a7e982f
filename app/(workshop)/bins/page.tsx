import type { Metadata } from 'next';
import Link from 'next/link';
import { CabinetDrawing } from '@/components/drawings/cabinet-drawing';
import { BinSheet } from '@/components/stores/bin-sheet';
import { CabinetForm } from '@/components/stores/cabinet-form';
import { STORES_LINKS } from '@/components/stores/stores-links';
import { AreaLinks } from '@/components/shell/area-links';
import { ButtonLink } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Beside } from '@/components/ui/section';
import { ask } from '@/lib/api/ask';
import { getBin } from '@/lib/stores/get-bin';
import { listBins } from '@/lib/stores/list-bins';
import { listCabinets } from '@/lib/stores/list-cabinets';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Bins' };

const MOST_BINS = 3_600;

export default async function BinsPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ cabinet?: string; bin?: string }>;
}) {
  const asked = await searchParams;
  const [cabinets, me, opened] = await Promise.all([
    ask(listCabinets, {}),
    ask(whoAmI, {}),
    asked.bin === undefined ? null : ask(getBin, { binId: asked.bin }),
  ]);
  const mayWrite = me.roles.some((role) => role === 'storekeeper' || role === 'lead');
  const cabinet =
    cabinets.find((one) => one.id === (opened?.cabinetId ?? asked.cabinet)) ??
    cabinets.find((one) => one.code === asked.cabinet) ??
    cabinets[0];
  if (!cabinet) {
    return (
      <>
        <PageTitle above={<AreaLinks label="Stores" links={STORES_LINKS} />} title="Bins" />
        <EmptyState title="No cabinet yet" actions={mayWrite ? <CabinetForm /> : undefined}>
          A cabinet has columns and rows of bins; every lot lies in one of them.
        </EmptyState>
      </>
    );
  }
  const { rows: bins } = await ask(listBins, { cabinetId: cabinet.id, size: MOST_BINS });
  const drawing = (
    <CabinetDrawing
      label={`Cabinet ${cabinet.code}, ${cabinet.room}`}
      columns={cabinet.columns}
      bins={bins.map((bin) => ({
        code: bin.code,
        column: bin.column,
        row: bin.row,
        content: bin.contents[0]?.name ?? null,
        contentName: bin.contents.map((one) => `${one.onHand} ${one.name}`).join(', ') || 'nothing',
        fill: bin.fill,
        href: `/bins?bin=${bin.id}`,
        countDue: bin.countDueSince !== null,
        selected: bin.id === asked.bin,
      }))}
    />
  );
  return (
    <>
      <PageTitle
        above={<AreaLinks label="Stores" links={STORES_LINKS} />}
        title={`Cabinet ${cabinet.code}`}
        remainder={[cabinet.name, cabinet.room]
          .filter((word) => word !== '' && word !== `Cabinet ${cabinet.code}`)
          .join(', ')}
        facts={[
          <>
            <Strong mono>{cabinet.bins}</Strong> bins
          </>,
          <>
            <Strong mono>{cabinet.empty}</Strong> empty
          </>,
          cabinet.dueForCount > 0 ? (
            <>
              <Strong mono>{cabinet.dueForCount}</Strong> due for a count
            </>
          ) : null,
        ]}
        actions={
          <>
            {mayWrite ? <CabinetForm /> : null}
            <ButtonLink href="/counts">Count what is due</ButtonLink>
          </>
        }
      />
      {cabinets.length > 1 ? (
        <nav aria-label="Cabinets" className="mb-3">
          <ul className="flex flex-wrap gap-x-1">
            {cabinets.map((one) => (
              <li key={one.id}>
                <Link
                  href={`/bins?cabinet=${one.id}`}
                  aria-current={one.id === cabinet.id ? 'page' : undefined}
                  className={`inline-flex min-h-9 items-center px-3 max-sm:min-h-11 ${one.id === cabinet.id ? 'border-b-2 border-copper font-semibold' : 'text-copper hover:bg-copper-wash'}`}
                >
                  {one.code}
                  {one.room === cabinet.room ? '' : `, ${one.room}`}
                </Link>
              </li>
            ))}
          </ul>
        </nav>
      ) : null}
      {opened === null ? drawing : <Beside beside={<BinSheet bin={opened} mayWrite={mayWrite} />}>{drawing}</Beside>}
    </>
  );
}
