/** Lists that could not be read: what was wrong with each, and the original, which is kept. */
import { ButtonLink } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { dayText } from '@/components/workshop/clock-time';

interface Rejected {
  readonly id: string;
  readonly fileName: string;
  readonly createdAt: string;
  readonly problem: unknown;
}

export function RejectedLists({ rejected }: { readonly rejected: readonly Rejected[] }) {
  return (
    <Section title="Lists that could not be read" remainder="kept as they came">
      <ul className="border-t border-rule">
        {rejected.map((one) => (
          <li key={one.id} className="flex flex-wrap items-center justify-between gap-3 border-b border-hair py-2">
            <span className="min-w-0">
              <span className="font-mono break-all">{one.fileName}</span>
              <span className="text-soft">, {dayText(one.createdAt)}</span>
              <span className="block text-small">{detailOf(one.problem)}</span>
            </span>
            <ButtonLink size="small" href={`/api/v1/uploads/${one.id}/original`} download>
              Fetch it back<span className="sr-only">: {one.fileName}</span>
            </ButtonLink>
          </li>
        ))}
      </ul>
    </Section>
  );
}

function detailOf(problem: unknown): string {
  return problem !== null && typeof problem === 'object' && 'detail' in problem && typeof problem.detail === 'string'
    ? problem.detail
    : 'It could not be read.';
}
