import type { Metadata } from 'next';
import Link from 'next/link';
import { railsText } from '@/components/circuits/rails-text';
import { LineForm } from '@/components/lines/line-form';
import { LineSearch } from '@/components/lines/line-search';
import { LinesGrid } from '@/components/lines/lines-grid';
import { StandInSheet } from '@/components/lines/stand-in-sheet';
import { TryPart } from '@/components/lines/try-part';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Beside } from '@/components/ui/section';
import { TallyStrip } from '@/components/ui/tally-strip';
import { Act } from '@/components/workshop/act';
import { StateWord } from '@/components/workshop/state-word';
import { ask } from '@/lib/api/ask';
import { assessPart } from '@/lib/circuits/assess-part';
import type { copyRevision } from '@/lib/circuits/copy-revision';
import { getRevision } from '@/lib/circuits/get-revision';
import { lineCandidates } from '@/lib/circuits/line-candidates';
import { listLines } from '@/lib/circuits/list-lines';
import type { createBatch } from '@/lib/stores/create-batch';
import { whoAmI } from '@/lib/workshop/who-am-i';

export const metadata: Metadata = { title: 'Lines' };

const STANDINGS = ['shelf', 'effect', 'ask', 'buy', 'not-fitted'] as const;
type Standing = (typeof STANDINGS)[number];
const MOST_ROWS_AT_HAND = 200;

interface Asked {
  readonly units?: string;
  readonly standing?: string;
  readonly search?: string;
  readonly line?: string;
  readonly part?: string;
}

export default async function RevisionPage({
  params,
  searchParams,
}: {
  readonly params: Promise<{ revisionId: string }>;
  readonly searchParams: Promise<Asked>;
}) {
  const { revisionId } = await params;
  const asked = await searchParams;
  const units = Math.min(10_000, Math.max(1, Number(asked.units) || 1));
  const standing = STANDINGS.find((one) => one === asked.standing);
  const words = String(asked.search ?? '').trim();
  const search = words === '' ? undefined : words;
  const filter = {
    ...(standing === undefined ? {} : { standing: [standing] }),
    ...(search === undefined ? {} : { search }),
  };
  const [revision, lines, me, sheet] = await Promise.all([
    ask(getRevision, { revisionId, units }),
    ask(listLines, { revisionId, units, size: MOST_ROWS_AT_HAND, ...filter }),
    ask(whoAmI, {}),
    asked.line === undefined ? null : ask(lineCandidates, { lineId: asked.line }),
  ]);
  const mayWrite = me.roles.some((role) => role === 'builder' || role === 'lead');
  const here = (changes: Partial<Asked>) => addressOf(revisionId, { ...asked, ...changes });
  const backHref = here({ line: undefined, part: undefined });

  const decided = sheet?.decisions[0]?.partId ?? null;
  const wanted = asked.part ?? decided ?? sheet?.candidates[0]?.part.id ?? null;
  const among = sheet?.candidates.find((one) => one.part.id === wanted);
  const offered =
    sheet === null || wanted === null
      ? null
      : (among ?? (await ask(assessPart, { lineId: sheet.line.id, partId: wanted })));

  const tally = (key: Standing, word: string, tone: 'good' | 'look' | 'ask' | 'stop' | 'plain') => ({
    key,
    count: revision.standings[key],
    word,
    tone,
    href: here({ standing: standing === key ? undefined : key }),
    current: standing === key,
  });
  return (
    <>
      <PageTitle
        above={
          <p className="mb-1 text-small">
            <Link href={`/circuits/${revision.circuit.id}`} className="text-copper hover:underline">
              All revisions of {revision.circuit.name}
            </Link>
          </p>
        }
        title={revision.circuit.name}
        remainder={`revision ${revision.name}`}
        facts={[
          <StateWord key="state" state={revision.state} />,
          <>rails {railsText(revision.circuit.railsVolts)}</>,
          <>
            <Strong mono>{revision.lines}</Strong> lines, <Strong mono>{revision.designators}</Strong> designators
          </>,
          revision.upload === null ? null : (
            <>
              from <span className="font-mono break-all">{revision.upload.fileName}</span>
            </>
          ),
        ]}
        actions={
          <>
            <ButtonLink kind="quiet" href={`/revisions/${revision.id}/import`}>
              As it was read
            </ButtonLink>
            <ButtonLink kind="quiet" href={`/api/v1/revisions/${revision.id}/export`} download>
              CSV
            </ButtonLink>
            {revision.earlier ? (
              <ButtonLink href={`/revisions/${revision.id}/compare?with=${revision.earlier.id}`}>
                Compare with {revision.earlier.name}
              </ButtonLink>
            ) : null}
            {mayWrite && revision.state === 'frozen' ? (
              <>
                <Act<typeof copyRevision>
                  endpoint="POST /revisions/{revisionId}/copy"
                  input={{ revisionId: revision.id }}
                  word="Copy into a new one"
                  title={`Copy revision ${revision.name}`}
                  text="The copy is a draft; this one stays as it is."
                  questions={[{ field: 'name', label: 'Name of the copy', kind: 'line' }]}
                  go="/revisions/{id}"
                />
                <Act<typeof createBatch>
                  endpoint="POST /batches"
                  input={{ revisionId: revision.id }}
                  word="Plan a batch"
                  busyWord="Planning …"
                  kind="primary"
                  title={`Batch of ${revision.circuit.name} ${revision.name}`}
                  text="Nothing is taken from the shelf yet; reserving is the next step."
                  questions={[
                    { field: 'units', label: 'How many units', kind: 'number', initial: String(units) },
                    { field: 'neededBy', label: 'Needed by', kind: 'day', optional: true },
                  ]}
                  go="/batches/{id}"
                />
              </>
            ) : null}
          </>
        }
      />
      {revision.openQuestions > 0 ? (
        <div className="mb-4">
          <Notice
            tone="look"
            title={`${revision.openQuestions} ${revision.openQuestions === 1 ? 'question is' : 'questions are'} open`}
            actions={<ButtonLink href={`/revisions/${revision.id}/import`}>Answer</ButtonLink>}
          >
            The revision can be frozen when they are settled.
          </Notice>
        </div>
      ) : null}
      <TallyStrip
        label="Lines by where they stand"
        segments={[
          tally('shelf', 'on the shelf', 'good'),
          tally('effect', 'with an effect', 'look'),
          tally('ask', 'to ask', 'ask'),
          tally('buy', 'to buy', 'stop'),
          tally('not-fitted', 'not fitted', 'plain'),
        ]}
      />
      <LineSearch initial={search ?? ''} units={units} />
      {sheet === null ? (
        <LinesGrid
          rows={lines.rows}
          total={lines.total}
          query={{ revisionId, units, ...(standing ? { standing } : {}), ...(search ? { search } : {}) }}
        />
      ) : (
        <Beside
          beside={
            <StandInSheet
              facts={sheet}
              offered={offered}
              hrefBase={here({ part: undefined })}
              backHref={backHref}
              mayDecide={mayWrite}
              more={
                <>
                  <TryPart hrefStart={`${here({ part: undefined })}&part=`} />
                  {mayWrite ? (
                    <LineForm key={sheet.line.id + sheet.line.specKey} line={sheet.line} backHref={backHref} />
                  ) : null}
                </>
              }
            />
          }
        >
          <div className="max-lg:hidden">
            <LinesGrid
              rows={lines.rows}
              total={lines.total}
              query={{ revisionId, units, ...(standing ? { standing } : {}), ...(search ? { search } : {}) }}
            />
          </div>
        </Beside>
      )}
    </>
  );
}

function addressOf(revisionId: string, asked: Asked): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(asked))
    if (typeof value === 'string' && value !== '') query.set(name, value);
  return `/revisions/${revisionId}${query.size > 0 ? `?${query}` : ''}`;
}
