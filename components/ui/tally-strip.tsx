/**
 * The state of a list at a glance: one strip, each segment as wide as its share, pressed to see only those rows. Links
 * where the filter lives in the address (the usual case); buttons where a client component holds it.
 */
import Link from 'next/link';
import { Glyph, type GlyphName } from './glyph';

export type TallyTone = 'good' | 'look' | 'ask' | 'stop' | 'plain';

export interface TallySegment {
  readonly key: string;
  readonly count: number;
  /** Follows the count: "on the shelf", "to ask". */
  readonly word: string;
  readonly tone: TallyTone;
  /** Left out, the tone's own sign is used. */
  readonly glyph?: GlyphName;
  readonly href?: string;
  readonly onPress?: () => void;
  readonly current?: boolean;
}

const TONES: Readonly<Record<TallyTone, { readonly look: string; readonly glyph: GlyphName }>> = {
  good: { look: 'bg-mask-wash text-mask border-mask-wash', glyph: 'same' },
  look: { look: 'bg-amber-wash text-amber border-amber-wash', glyph: 'with-effect' },
  ask: { look: 'bg-sheet text-ink border-dashed border-soft', glyph: 'ask' },
  stop: { look: 'bg-oxide-wash text-oxide border-oxide-wash', glyph: 'refused' },
  plain: { look: 'bg-hair text-ink border-hair', glyph: 'drop-in' },
};

export function TallyStrip({
  label,
  segments,
}: {
  readonly label: string;
  readonly segments: readonly TallySegment[];
}) {
  const shown = segments.filter((segment) => segment.count > 0 || segment.current === true);
  if (shown.length === 0) return null;
  return (
    <nav aria-label={label} className="mb-3.5">
      <ul className="flex flex-wrap gap-0.5">
        {shown.map(({ key, ...segment }) => (
          // The basis is the words' own width, so a small share is never cut short; what is left over goes by share.
          <li key={key} className="min-w-max basis-auto" style={{ flexGrow: Math.max(segment.count, 0.01) }}>
            <Segment {...segment} />
          </li>
        ))}
      </ul>
    </nav>
  );
}

function Segment({ count, word, tone, glyph, href, onPress, current = false }: Omit<TallySegment, 'key'>) {
  const { look, glyph: own } = TONES[tone];
  const className = `flex min-h-[30px] w-full items-center gap-2 border px-2.5 text-left text-small max-sm:min-h-11 ${look} ${current ? '!border-solid !border-current font-semibold' : ''} ${href !== undefined || onPress !== undefined ? 'hover:!border-current' : ''}`;
  const inside = (
    <>
      <Glyph name={glyph ?? own} size={15} />
      <span>
        <span className="font-semibold">{count.toLocaleString('en-GB')}</span> {word}
      </span>
      {current ? (
        <span className="ml-auto flex items-center gap-1 pl-2">
          <Glyph name="close" size={10} />
          <span className="sr-only">shown alone; press to show all</span>
        </span>
      ) : null}
    </>
  );
  if (href !== undefined) {
    return (
      <Link href={href} aria-current={current ? 'true' : undefined} scroll={false} className={className}>
        {inside}
      </Link>
    );
  }
  if (onPress !== undefined) {
    return (
      <button type="button" aria-pressed={current} onClick={onPress} className={className}>
        {inside}
      </button>
    );
  }
  return <span className={className}>{inside}</span>;
}
