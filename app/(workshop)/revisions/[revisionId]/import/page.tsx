import type { Metadata } from 'next';
import Link from 'next/link';
import { ImportTable } from '@/components/circuits/import-table';
import { Questions } from '@/components/circuits/questions';
import { ReadingUnderWay } from '@/components/circuits/reading-under-way';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Section } from '@/components/ui/section';
import { Act } from '@/components/workshop/act';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import type { freezeRevision } from '@/lib/circuits/freeze-revision';
import { readingOfRevision } from '@/lib/circuits/get-reading';
import { getRevision } from '@/lib/circuits/get-revision';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Parts list as read' };

export default async function ImportPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ revisionId: string }>;
  readonly searchParams: Promise<{ sheet?: string; from?: string }>;
}) {
  const { revisionId } = await params;
  const { sheet, from } = await searchParams;
  const start = Math.max(1, Number(from) || 1);
  const [revision, reading, me] = await Promise.all([
    ask(getRevision, { revisionId }),
    ask(readingOfRevision, { revisionId, from: start, ...(sheet === undefined ? {} : { sheet }) }),
    ask(whoAmI, {}),
  ]);
  const mayWrite = revision.state === 'draft' && me.roles.some((role) => role === 'builder' || role === 'lead');
  const unread = revision.lines === 0 && revision.upload !== null && revision.upload.state === 'received';
  return (
    <>
      <PageTitle
        above={
          <p className="mb-1 text-small">
            <Link href={`/circuits/${revision.circuit.id}`} className="text-copper hover:underline">
              {revision.circuit.name}
            </Link>
          </p>
        }
        title={`Revision ${revision.name}`}
        remainder="as it was read"
        facts={[
          <StateWord key="state" state={revision.state} />,
          <>
            <Strong mono>{revision.lines}</Strong> lines, <Strong mono>{revision.notLines}</Strong> rows that are no
            parts
          </>,
          revision.upload === null ? null : <span className="font-mono break-all">{revision.upload.fileName}</span>,
        ]}
        actions={
          <>
            {revision.upload === null ? null : (
              <ButtonLink kind="quiet" href={`/api/v1/revisions/${revision.id}/original`} download>
                Fetch the original
              </ButtonLink>
            )}
            <ButtonLink href={`/revisions/${revision.id}`}>Lines and stand-ins</ButtonLink>
            {mayWrite && !unread ? (
              <Act<typeof freezeRevision>
                endpoint="POST /revisions/{revisionId}/freeze"
                input={{ revisionId: revision.id, version: revision.version }}
                word="Freeze this revision"
                busyWord="Freezing …"
                kind="primary"
                said={`Revision ${revision.name} is frozen`}
                go={`/revisions/${revision.id}`}
              />
            ) : null}
          </>
        }
      />
      {unread && revision.upload !== null ? (
        <ReadingUnderWay uploadId={revision.upload.id} circuitId={revision.circuit.id} mayStop={mayWrite} />
      ) : (
        <>
          {reading.questions.length > 0 ? (
            <Questions questions={reading.questions} mayAnswer={mayWrite} />
          ) : revision.state === 'draft' ? (
            <Notice tone="good" title="No question is open">
              Look the rows over, then freeze the revision. Nothing is frozen before you say so.
            </Notice>
          ) : null}
          {reading.sheets.length > 1 ? (
            <nav aria-label="Sheets" className="mt-5 flex flex-wrap gap-x-4">
              {reading.sheets.map((one) => (
                <Link
                  key={one}
                  href={`/revisions/${revision.id}/import?sheet=${encodeURIComponent(one)}`}
                  className="min-h-8 text-copper hover:underline"
                  aria-current={one === sheet ? 'page' : undefined}
                >
                  {one}
                </Link>
              ))}
            </nav>
          ) : null}
          {reading.tables.map((table) => (
            <Section
              key={table.sheet ?? ''}
              title={table.sheet ?? 'The list'}
              remainder="row by row, beside what was understood"
            >
              <ImportTable revisionId={revision.id} version={revision.version} table={table} mayChange={mayWrite} />
              {table.rowsKept > start + table.rows.length - 1 ? (
                <p className="mt-3">
                  <ButtonLink href={`/revisions/${revision.id}/import?from=${start + table.rows.length}`}>
                    Further rows of {table.rowCount.toLocaleString('en-GB')}
                  </ButtonLink>
                </p>
              ) : null}
            </Section>
          ))}
        </>
      )}
    </>
  );
}
