/** The day a delivery is expected on, with its sign where that is past. */
import { Glyph } from '@/components/ui/glyph';
import { dayText } from '@/components/workshop/clock-time';

export function ExpectedOn({ day, late }: { readonly day: string | null; readonly late: boolean }) {
  if (day === null) return <span className="text-soft">–</span>;
  if (!late) return <>{dayText(day)}</>;
  return (
    <span className="inline-flex items-baseline gap-1.5 text-oxide">
      <Glyph name="look" size={14} className="translate-y-[2px]" />
      {dayText(day)}, late
    </span>
  );
}
