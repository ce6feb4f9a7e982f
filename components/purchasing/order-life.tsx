/** Where an order stands, drawn as the way it goes. */
import { Glyph } from '@/components/ui/glyph';
import { StateWord } from '@/components/workshop/state-word';

const STEPS = [
  { word: 'draft', states: ['draft'] },
  { word: 'approval', states: ['submitted'] },
  { word: 'payment', states: ['approved'] },
  { word: 'sending', states: ['paid', 'on-account'] },
  { word: 'delivery', states: ['sent', 'part-received'] },
  { word: 'received', states: ['received'] },
  { word: 'closed', states: ['closed'] },
] as const;

export function OrderLife({ state }: { readonly state: string }) {
  if (state === 'cancelled') {
    return (
      <p className="mb-4 text-lead">
        <StateWord state="cancelled" strong />
      </p>
    );
  }
  const at = STEPS.findIndex((step) => (step.states as readonly string[]).includes(state));
  return (
    <ol aria-label="Where the order stands" className="mb-5 flex flex-wrap border-y border-rule">
      {STEPS.map((step, index) => (
        <li
          key={step.word}
          aria-current={index === at ? 'step' : undefined}
          className={`flex min-h-9 flex-1 items-center gap-1.5 px-2.5 text-small whitespace-nowrap ${index === at ? 'bg-copper-wash font-semibold text-ink' : index < at ? 'text-mask' : 'text-soft'}`}
        >
          {index < at ? <Glyph name="same" size={13} /> : null}
          {index === at ? <StateWord state={state} strong /> : step.word}
        </li>
      ))}
    </ol>
  );
}
