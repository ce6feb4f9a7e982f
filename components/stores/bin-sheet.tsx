/** What lies in one drawer, lot by lot, and what moved through it lately. */
import Link from 'next/link';
import type { z } from 'zod';
import { LookOf } from '@/components/drawings/look-of';
import { Glyph } from '@/components/ui/glyph';
import { Sheet } from '@/components/ui/section';
import { Act } from '@/components/workshop/act';
import { clockText, dayText } from '@/components/workshop/clock-time';
import type { getBin } from '@/lib/stores/get-bin';
import type { openCount } from '@/lib/stores/open-count';
import type { retireBin } from '@/lib/stores/retire-bin';
import { LotActs } from './lot-acts';
import { movementWord } from './movements-table';

export function BinSheet({
  bin,
  mayWrite,
}: {
  readonly bin: z.output<typeof getBin.output>;
  readonly mayWrite: boolean;
}) {
  return (
    <Sheet
      title={<span className="font-mono">{bin.code}</span>}
      aside={
        <Link href={`/bins?cabinet=${bin.cabinetId}`} scroll={false} className="text-small text-copper hover:underline">
          Close
        </Link>
      }
    >
      <p className="text-soft">
        Cabinet {bin.cabinet}, {bin.room}: column {bin.column}, row {bin.row}
      </p>
      {bin.countDueSince === null ? null : (
        <p className="mt-1 flex items-baseline gap-1.5 text-amber">
          <Glyph name="due" size={12} /> due for a count: {bin.countDueReason ?? 'planned'}
        </p>
      )}
      {bin.retired ? <p className="mt-1 text-oxide">This bin is retired.</p> : null}
      {bin.lots.length === 0 ? (
        <p className="my-4">Empty.</p>
      ) : (
        <ul className="my-3 border-t border-rule">
          {bin.lots.map((lot) => (
            <li key={lot.lotId} className="border-b border-hair py-2">
              <p className="flex flex-wrap items-baseline justify-between gap-x-3">
                <Link href={`/parts/${lot.part.id}`} className="font-semibold text-copper hover:underline">
                  {lot.part.name}
                </Link>
                <span className="font-mono">
                  {lot.onHand}
                  {lot.reserved > 0 ? <span className="text-small text-soft"> ({lot.reserved} reserved)</span> : null}
                </span>
              </p>
              <div className="my-1">
                <LookOf part={lot.part} />
              </div>
              <p className="text-small text-soft">
                since {dayText(lot.receivedAt)}
                {lot.lotCode === null ? '' : `, lot ${lot.lotCode}`}
                {lot.dateCode === null ? '' : `, date ${lot.dateCode}`}
              </p>
              {mayWrite ? (
                <LotActs lotId={lot.lotId} what={`${lot.part.name} from ${bin.code}`} free={lot.free} />
              ) : null}
            </li>
          ))}
        </ul>
      )}
      {mayWrite && !bin.retired ? (
        <div className="flex flex-wrap gap-2.5">
          {bin.openCount === null ? (
            <Act<typeof openCount>
              endpoint="POST /counts"
              input={{ binIds: [bin.id], reason: 'asked for at the bin' }}
              word="Count this bin"
              busyWord="Opening …"
              go="/counts/{id}"
            />
          ) : (
            <Link href={`/counts/${bin.openCount.id}`} className="text-copper hover:underline">
              In count {bin.openCount.number}
            </Link>
          )}
          {bin.lots.length === 0 ? (
            <Act<typeof retireBin>
              endpoint="POST /bins/{binId}/retire"
              input={{ binId: bin.id }}
              word="Retire it"
              kind="danger"
              title={`Retire bin ${bin.code}`}
              text="It takes nothing any more; its history stays."
              said={`${bin.code} is retired`}
            />
          ) : null}
        </div>
      ) : null}
      {bin.recent.length > 0 ? (
        <div className="mt-4">
          <h3 className="mb-1 font-bold">Lately</h3>
          <ul>
            {bin.recent.slice(0, 8).map((one) => (
              <li key={one.id} className="flex justify-between gap-3 border-b border-hair py-1 text-small">
                <span>
                  <span className="text-soft">
                    {dayText(one.at)} {clockText(one.at)}
                  </span>{' '}
                  {movementWord(one.kind)} {one.partName}
                </span>
                <span className="font-mono">{one.quantity > 0 ? `+${one.quantity}` : `−${-one.quantity}`}</span>
              </li>
            ))}
          </ul>
        </div>
      ) : null}
    </Sheet>
  );
}
