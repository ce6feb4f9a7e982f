/** The state of a thing as sign, word and colour: batches, orders, counts, revisions, uploads. */
import { Glyph, type GlyphName } from '@/components/ui/glyph';

type Tone = 'good' | 'look' | 'stop' | 'plain';

const INK: Readonly<Record<Tone, string>> = {
  good: 'text-mask',
  look: 'text-amber',
  stop: 'text-oxide',
  plain: 'text-soft',
};

const STATES: Readonly<Record<string, readonly [word: string, tone: Tone, glyph: GlyphName]>> = {
  draft: ['draft', 'look', 'with-effect'],
  frozen: ['frozen', 'good', 'same'],
  planned: ['planned', 'plain', 'note'],
  reserved: ['reserved', 'look', 'mark'],
  picking: ['being picked', 'look', 'up'],
  kitted: ['kit complete', 'good', 'drop-in'],
  finished: ['finished', 'good', 'same'],
  cancelled: ['cancelled', 'stop', 'refused'],
  submitted: ['waits for approval', 'look', 'ask'],
  approved: ['approved', 'look', 'drop-in'],
  'on-account': ['on account', 'good', 'drop-in'],
  paid: ['paid', 'good', 'drop-in'],
  sent: ['sent', 'look', 'up'],
  'part-received': ['partly received', 'look', 'down'],
  received: ['received', 'good', 'down'],
  closed: ['closed', 'good', 'same'],
  open: ['open', 'look', 'note'],
  recount: ['to be counted again', 'look', 'ask'],
  counted: ['counted', 'look', 'ask'],
  posted: ['posted', 'good', 'same'],
  abandoned: ['abandoned', 'plain', 'refused'],
};

export function StateWord({ state, strong = false }: { readonly state: string; readonly strong?: boolean }) {
  const [word, tone, glyph] = STATES[state] ?? [state, 'plain', 'note'];
  return (
    <span
      className={`inline-flex items-baseline gap-1.5 whitespace-nowrap ${INK[tone]} ${strong ? 'font-semibold' : ''}`}
    >
      <Glyph name={glyph} size={14} className="translate-y-[2px]" />
      {word}
    </span>
  );
}
