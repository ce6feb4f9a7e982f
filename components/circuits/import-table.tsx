'use client';
/**
 * The list as it stood, each column with what it was taken for and why, what was understood of each row beside its text. Client: a
 * column's role and a row that is no part can be corrected in place.
 */
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { kindWord } from '@/components/lines/line-words';
import { Button } from '@/components/ui/button';
import { Glyph } from '@/components/ui/glyph';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { useCommand } from '@/lib/api/client';
import type { changeColumnRole } from '@/lib/circuits/change-column-role';
import type { takeRowAsLine } from '@/lib/circuits/take-row';
import { COLUMN_ROLE_WORDS } from './column-role-words';

interface ReadLine {
  readonly id: string;
  readonly designators: readonly string[];
  readonly quantity: number;
  readonly fitted: boolean;
  readonly kind: string;
  readonly text: string;
}
interface ReadTable {
  readonly sheet: string | null;
  readonly columns: readonly {
    readonly index: number;
    readonly heading: string;
    readonly role: string;
    readonly because: string;
  }[];
  readonly rows: readonly {
    readonly row: number;
    readonly cells: readonly string[];
    readonly lines: readonly ReadLine[];
    readonly notLine: string | null;
    readonly questionIds: readonly string[];
  }[];
}

export function ImportTable({
  revisionId,
  version,
  table,
  mayChange,
}: {
  readonly revisionId: string;
  readonly version: number;
  readonly table: ReadTable;
  readonly mayChange: boolean;
}) {
  const router = useRouter();
  const say = useSay();
  const [changing, setChanging] = useState<number | null>(null);
  const change = useCommand<typeof changeColumnRole>('POST /revisions/{revisionId}/columns');
  const take = useCommand<typeof takeRowAsLine>('POST /revisions/{revisionId}/rows');
  const problem = change.error ?? take.error;
  const shown = table.columns.filter(
    (column) => column.role !== 'ignore' || table.rows.some((row) => (row.cells[column.index] ?? '') !== ''),
  );

  function setRole(index: number, role: string) {
    const known = COLUMN_ROLE_WORDS.find(([name]) => name === role)?.[0];
    if (!known) return;
    setChanging(index);
    change.mutate(
      { revisionId, version, sheet: table.sheet, index, role: known },
      {
        onSuccess: ({ lines }) => {
          say(`Read again: ${lines} lines`);
          router.refresh();
        },
        onSettled: () => setChanging(null),
      },
    );
  }

  return (
    <>
      {problem ? (
        <div className="mb-3">
          <Notice tone="stop" announce title={problem.details.title}>
            {problem.details.detail}
          </Notice>
        </div>
      ) : null}
      <div
        role="region"
        aria-label="The list, scrollable"
        tabIndex={0}
        className="relative max-w-full overflow-x-auto border border-rule"
      >
        <table className="w-full border-collapse bg-sheet text-small">
          <thead>
            <tr className="align-bottom">
              <th scope="col" className="border-b border-ink px-2 py-2 text-right font-semibold text-soft">
                Row
              </th>
              <th
                scope="col"
                className="min-w-44 border-r border-b border-ink px-2 py-2 text-left font-semibold text-soft"
              >
                Understood as
              </th>
              {shown.map((column) => (
                <th
                  key={column.index}
                  scope="col"
                  className="min-w-32 border-b border-ink px-2 py-2 text-left font-normal"
                >
                  <span className="block font-semibold text-ink">
                    {column.heading === '' ? 'no heading' : column.heading}
                  </span>
                  {mayChange ? (
                    <select
                      aria-label={`What the column ${column.heading === '' ? column.index + 1 : column.heading} is`}
                      value={column.role}
                      disabled={changing !== null}
                      onChange={(event) => setRole(column.index, event.target.value)}
                      className="mt-1 w-full border border-edge bg-paper px-1 py-1 max-sm:min-h-11"
                    >
                      {COLUMN_ROLE_WORDS.map(([role, word]) => (
                        <option key={role} value={role}>
                          {word}
                        </option>
                      ))}
                    </select>
                  ) : (
                    <span className="block">
                      {COLUMN_ROLE_WORDS.find(([role]) => role === column.role)?.[1] ?? column.role}
                    </span>
                  )}
                  <span className="mt-0.5 block text-fine text-soft">{column.because}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.rows.map((row) => {
              const noPart = row.lines.length === 0;
              return (
                <tr
                  key={row.row}
                  className={noPart ? 'hatched text-soft' : row.questionIds.length > 0 ? 'bg-amber-wash' : ''}
                >
                  <td className="border-b border-hair px-2 py-1 text-right font-mono text-soft">{row.row}</td>
                  <td className="border-r border-b border-hair px-2 py-1">
                    {noPart ? (
                      <span className="flex flex-wrap items-center justify-between gap-2">
                        {row.notLine ?? 'no part'}
                        {mayChange ? (
                          <Button
                            size="small"
                            kind="quiet"
                            busy={take.isPending}
                            onClick={() =>
                              take.mutate(
                                { revisionId, version, sheet: table.sheet, row: row.row },
                                { onSuccess: () => router.refresh() },
                              )
                            }
                          >
                            It is a part<span className="sr-only">: row {row.row}</span>
                          </Button>
                        ) : null}
                      </span>
                    ) : (
                      row.lines.map((line) => (
                        <UnderstoodLine key={line.id} line={line} asks={row.questionIds.length > 0} />
                      ))
                    )}
                  </td>
                  {shown.map((column) => (
                    <td key={column.index} className="max-w-64 border-b border-hair px-2 py-1 break-words">
                      {row.cells[column.index] ?? ''}
                    </td>
                  ))}
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
    </>
  );
}

function UnderstoodLine({ line, asks }: { readonly line: ReadLine; readonly asks: boolean }) {
  return (
    <span className="flex flex-wrap items-baseline gap-x-2">
      {asks ? (
        <Glyph name="ask" size={13} className="translate-y-[2px] text-amber" />
      ) : (
        <Glyph name="same" size={13} className="translate-y-[2px] text-mask" />
      )}
      <span className="font-mono">{line.quantity} ×</span>
      <span>{kindWord(line.kind)}</span>
      <span className="font-mono font-semibold">{line.text}</span>
      {line.fitted ? null : <span className="text-oxide">not fitted</span>}
    </span>
  );
}
