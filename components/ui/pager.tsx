/** From page to page of a long list, by links, so that a page can be shared and reloaded. */
import Link from 'next/link';
import { Glyph } from './glyph';

export function Pager({
  first,
  last,
  total,
  what,
  previousHref,
  nextHref,
}: {
  /** Numbers of the first and last row shown, counted from 1. */
  readonly first: number;
  readonly last: number;
  /** Null where counting all would cost more than it tells. */
  readonly total: number | null;
  /** The rows' plural: "movements". */
  readonly what: string;
  readonly previousHref: string | null;
  readonly nextHref: string | null;
}) {
  const number = (value: number) => value.toLocaleString('en-GB');
  return (
    <nav
      aria-label={`Pages of ${what}`}
      className="mt-3 flex flex-wrap items-center justify-between gap-3 print:hidden"
    >
      <p className="text-soft">
        <span className="font-mono text-ink">
          {number(first)}–{number(last)}
        </span>
        {total === null ? ` ${what}` : ` of ${number(total)} ${what}`}
      </p>
      <div className="flex gap-2.5">
        <Step href={previousHref} word="Earlier" glyph="previous" />
        <Step href={nextHref} word="Further" glyph="next" />
      </div>
    </nav>
  );
}

/** The pager of a list that is asked for page by page; nothing where one page holds all. */
export function Pages({
  page,
  size,
  total,
  what,
  hrefOf,
}: {
  /** Counted from 1. */
  readonly page: number;
  readonly size: number;
  readonly total: number;
  readonly what: string;
  readonly hrefOf: (page: number) => string;
}) {
  if (total <= size) return null;
  return (
    <Pager
      first={(page - 1) * size + 1}
      last={Math.min(total, page * size)}
      total={total}
      what={what}
      previousHref={page > 1 ? hrefOf(page - 1) : null}
      nextHref={page * size < total ? hrefOf(page + 1) : null}
    />
  );
}

function Step({
  href,
  word,
  glyph,
}: {
  readonly href: string | null;
  readonly word: string;
  readonly glyph: 'previous' | 'next';
}) {
  const inside = (
    <>
      {glyph === 'previous' ? <Glyph name="previous" size={13} /> : null}
      {word}
      {glyph === 'next' ? <Glyph name="next" size={13} /> : null}
    </>
  );
  const shape = 'inline-flex min-h-9 items-center gap-2 border px-3 font-semibold max-sm:min-h-12 max-sm:px-4';
  if (href === null) return <span className={`${shape} border-rule text-soft`}>{inside}</span>;
  return (
    <Link
      href={href}
      rel={glyph === 'next' ? 'next' : 'prev'}
      className={`${shape} border-copper text-copper hover:bg-copper-wash`}
    >
      {inside}
    </Link>
  );
}
