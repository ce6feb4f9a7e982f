/** The argument beside a line: asked for and offered side by side, every check with its reason, what else there is. */
import Link from 'next/link';
import type { ReactNode } from 'react';
import type { z } from 'zod';
import { LookOf } from '@/components/drawings/look-of';
import { Caution } from '@/components/ui/caution';
import { Glyph, type GlyphName } from '@/components/ui/glyph';
import { Sheet } from '@/components/ui/section';
import { Verdict, type VerdictName } from '@/components/ui/verdict';
import type { lineCandidates } from '@/lib/circuits/line-candidates';
import { DecideForm } from './decide-form';
import { checkWord, designatorText, percentText } from './line-words';

type SheetFacts = z.output<typeof lineCandidates.output>;
type Candidate = SheetFacts['candidates'][number];

const OUTCOMES: Readonly<Record<Candidate['checks'][number]['outcome'], readonly [GlyphName, string, string]>> = {
  pass: ['same', 'text-mask', 'passes'],
  note: ['with-effect', 'text-amber', 'with a remark'],
  unknown: ['ask', 'text-ink', 'not known'],
  fail: ['refused', 'text-oxide', 'fails'],
};

export function StandInSheet({
  facts,
  offered,
  hrefBase,
  backHref,
  mayDecide,
  more,
}: {
  readonly facts: SheetFacts;
  /** The candidate looked at now; null where the shelf has none. */
  readonly offered: Candidate | null;
  /** This page's address; `&part=…` looks at another part. */
  readonly hrefBase: string;
  readonly backHref: string;
  readonly mayDecide: boolean;
  /** What stands below: the line's own fields, trying another part. */
  readonly more: ReactNode;
}) {
  const { line, candidates } = facts;
  const hrefOf = (partId: string) => `${hrefBase}&part=${partId}`;
  const isSafety =
    line.use === 'safety' ||
    candidates.some((one) => one.checks.some((check) => check.check === 'safety' && check.outcome === 'fail'));
  const others = candidates.filter((one) => one.part.id !== offered?.part.id);
  const stocked = facts.preferred.filter((one) => one.deviationPercent !== 0);
  return (
    <Sheet
      title={`${designatorText(line.designators, 3) || 'Line'}: ${line.spec.text || line.text}`}
      aside={<BackLink href={backHref} />}
    >
      <p className="text-small text-soft">
        {line.circuitName} {line.revisionName}, {line.quantity} a unit
        {line.use === null ? '' : `, used for ${line.use}`}
      </p>
      {isSafety ? (
        <div className="my-3">
          <Caution level="danger" title="No stand-in here">
            A mains or isolation place takes exactly the part asked for. Nothing is offered in its stead: the local
            electrical code and a licensed person decide.
          </Caution>
        </div>
      ) : null}
      {offered === null ? (
        <p className="my-3">
          <Glyph name="refused" size={14} className="text-oxide" /> Nothing on the shelf comes into question. It has to
          be bought, or another part tried below.
        </p>
      ) : (
        <OfferedPart facts={facts} offered={offered} />
      )}
      {mayDecide && line.fitted ? (
        <DecideForm
          key={`${line.id} ${offered?.part.id ?? ''}`}
          lineId={line.id}
          part={offered === null ? null : { id: offered.part.id, name: offered.part.name, verdict: offered.verdict }}
        />
      ) : null}
      {facts.decisions[0] ? (
        <p className="mt-3 text-small">
          Decided by {facts.decisions[0].by}:{' '}
          <strong className="font-semibold">{facts.decisions[0].partName ?? 'buy what was asked for'}</strong>
          {facts.decisions[0].reason === '' ? '' : ` (${facts.decisions[0].reason})`}
        </p>
      ) : facts.remembered ? (
        <p className="mt-3 text-small text-soft">
          For a line alike in {facts.remembered.circuitName} {facts.remembered.revisionName}, {facts.remembered.by} took{' '}
          {facts.remembered.partName ?? 'what was asked for'}.
        </p>
      ) : null}
      {others.length > 0 ? (
        <Block title="Also on the shelf">
          <ul className="border-t border-hair">
            {others.map((one) => (
              <li key={one.part.id} className="border-b border-hair">
                <Link
                  href={hrefOf(one.part.id)}
                  scroll={false}
                  className="flex min-h-9 flex-wrap items-baseline justify-between gap-x-3 py-1 hover:bg-copper-wash max-sm:min-h-11"
                >
                  <span className="min-w-0 font-semibold text-copper">
                    {one.part.name}
                    {one.deviationPercent ? (
                      <span className="font-normal text-soft"> {percentText(one.deviationPercent)}</span>
                    ) : null}
                  </span>
                  <span className="flex items-baseline gap-3">
                    <span className="font-mono text-small text-soft">{one.free} free</span>
                    <Verdict verdict={one.verdict as VerdictName} />
                  </span>
                </Link>
              </li>
            ))}
          </ul>
        </Block>
      ) : null}
      {stocked.length > 0 ? (
        <Block title="Preferred values near it">
          <ul className="grid grid-cols-[auto_1fr_auto_auto] gap-x-4 text-small">
            {stocked.map((one) => (
              <li key={one.series} className="contents">
                <span className="text-soft">{one.series}</span>
                <span className="font-mono">{one.text}</span>
                <span className="text-right font-mono">{percentText(one.deviationPercent)}</span>
                {one.partIds[0] === undefined ? (
                  <span className="text-soft">not stocked</span>
                ) : (
                  <Link href={hrefOf(one.partIds[0])} scroll={false} className="text-copper hover:underline">
                    on the shelf
                  </Link>
                )}
              </li>
            ))}
          </ul>
        </Block>
      ) : null}
      {more}
      <p className="mt-4 text-fine text-soft">Typical values; the maker’s datasheet decides.</p>
    </Sheet>
  );
}

function OfferedPart({ facts, offered }: { readonly facts: SheetFacts; readonly offered: Candidate }) {
  const worst =
    offered.checks.find((check) => check.outcome === 'fail') ??
    offered.checks.find((check) => check.outcome === 'unknown') ??
    offered.checks.find((check) => check.changes);
  return (
    <>
      <p className="mt-2">
        <Verdict verdict={offered.verdict as VerdictName} strong />{' '}
        {worst ? worst.why : offered.verdict === 'same' ? 'It is what the line asks for.' : 'Every check passes.'}
        {offered.deviationPercent ? ` The value is ${percentText(offered.deviationPercent)} off.` : ''}
      </p>
      <div className="my-2">
        <LookOf part={offered.part} />
      </div>
      <table className="w-full border-collapse text-small" aria-label="Checks">
        <thead>
          <tr className="align-bottom text-left text-soft">
            <th scope="col" className="border-b border-rule py-1.5 pr-2 font-normal">
              <span className="sr-only">Check</span>
            </th>
            <th scope="col" className="border-b border-rule py-1.5 pr-2 font-semibold">
              asked for
            </th>
            <th scope="col" className="border-b border-rule py-1.5 pr-2 font-semibold">
              {offered.part.name}
              <span className="block font-normal">
                {offered.bins[0] ? `${offered.bins[0].code}, ` : ''}
                {offered.free} free
              </span>
            </th>
            <th scope="col" className="border-b border-rule py-1.5">
              <span className="sr-only">Outcome</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {offered.checks.map((check, index) => {
            const [glyph, ink, word] = OUTCOMES[check.outcome];
            return (
              <tr key={index} className="align-top">
                <th scope="row" className="border-b border-hair py-1.5 pr-2 text-left font-normal text-soft">
                  {checkWord(check.check)}
                </th>
                <td className="border-b border-hair py-1.5 pr-2 break-words">{check.wanted}</td>
                <td className="border-b border-hair py-1.5 pr-2 break-words">
                  {check.offered}
                  {check.outcome === 'pass' ? null : <span className="block text-fine text-soft">{check.why}</span>}
                </td>
                <td className={`border-b border-hair py-1.5 text-right ${ink}`}>
                  <Glyph name={glyph} size={15} />
                  <span className="sr-only">{word}</span>
                </td>
              </tr>
            );
          })}
          {offered.checks.length === 0 ? (
            <tr>
              <td colSpan={4} className="py-1.5 text-soft">
                The same part as asked for: {facts.line.spec.text || facts.line.text}.
              </td>
            </tr>
          ) : null}
        </tbody>
      </table>
    </>
  );
}

function Block({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <div className="mt-4">
      <h3 className="mb-1 font-bold">{title}</h3>
      {children}
    </div>
  );
}

function BackLink({ href }: { readonly href: string }) {
  return (
    <Link
      href={href}
      scroll={false}
      className="inline-flex min-h-8 items-center text-small text-copper hover:underline max-sm:min-h-11"
    >
      Close
    </Link>
  );
}
