/** A verdict on a candidate: sign, word and colour together, so that no one of them has to carry it alone. */
import { Glyph } from './glyph';

export const VERDICTS = ['same', 'drop-in', 'with-effect', 'ask', 'refused'] as const;
export type VerdictName = (typeof VERDICTS)[number];

export const VERDICT_WORDS: Readonly<Record<VerdictName, string>> = {
  same: 'same',
  'drop-in': 'drop-in',
  'with-effect': 'with effect',
  ask: 'ask',
  refused: 'refused',
};

export const VERDICT_INK: Readonly<Record<VerdictName, string>> = {
  same: 'text-mask',
  'drop-in': 'text-mask',
  'with-effect': 'text-amber',
  ask: 'text-ink',
  refused: 'text-oxide',
};

/** `word` replaces the plain word where a sentence needs it ("Refused"); `signOnly` keeps the word for screen readers. */
export function Verdict({
  verdict,
  word = VERDICT_WORDS[verdict],
  signOnly = false,
  strong = false,
}: {
  readonly verdict: VerdictName;
  readonly word?: string;
  readonly signOnly?: boolean;
  readonly strong?: boolean;
}) {
  return (
    <span
      className={`inline-flex items-baseline gap-1.5 whitespace-nowrap ${VERDICT_INK[verdict]} ${strong ? 'font-semibold' : ''}`}
    >
      <Glyph name={verdict} size={15} className="translate-y-[2px]" />
      <span className={signOnly ? 'sr-only' : undefined}>{word}</span>
    </span>
  );
}
