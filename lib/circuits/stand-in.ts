/** The stand-in checks on two texts, without a list or a shelf: for programs, and for the bench. */
import 'server-only';
import { z } from 'zod';
import { Refusal } from '@/lib/api/problem';
import { query } from '@/lib/api/use-case';
import { PART_KINDS, type PartKind, type PartSpec } from '@/lib/electronics/part-spec';
import { readPartText } from '@/lib/electronics/read-part-text';
import { assess } from '@/lib/electronics/stand-in/assess';
import { USES } from '@/lib/electronics/stand-in/check';
import { RailsError, readRails } from '@/lib/electronics/stand-in/read-rails';
import { checkFields } from './line-candidates';
import { VERDICTS } from './line-standing';
import { partSpecSchema } from './part-spec-schema';

const partText = () => z.string().trim().min(1).max(500);

export const standIn = query({
  name: 'stand-in.assess',
  http: 'GET /stand-in',
  summary: 'May one part stand in for another? Both as people write them; rails like "+12,-12" or "±12".',
  roles: 'everyone',
  input: z.strictObject({
    wanted: partText(),
    offered: partText(),
    rails: z.string().trim().max(100).optional(),
    use: z.enum(USES).optional(),
    kind: z.enum(PART_KINDS).optional(),
  }),
  output: z.object({
    verdict: z.enum(VERDICTS),
    checks: z.array(checkFields),
    wanted: partSpecSchema,
    offered: partSpecSchema,
  }),
  async run({ input }) {
    const wanted = understood(input.wanted, input.kind, 'wanted');
    const offered = understood(input.offered, input.kind, 'offered');
    const { verdict, checks } = assess(wanted, offered, { rails: railsIn(input.rails), use: input.use ?? null });
    return { verdict, checks: [...checks], wanted, offered };
  },
});

function understood(text: string, kind: PartKind | undefined, field: string): PartSpec {
  const spec = readPartText(text, { kind: kind ?? null });
  if (spec.value === null && spec.partNumber === null && spec.kind === null) {
    const detail = `“${text}” can’t be read as a part; saying its kind may help.`;
    throw new Refusal('input.invalid', detail, { errors: [{ pointer: `/${field}`, code: 'unreadable', detail }] });
  }
  return spec;
}

function railsIn(text: string | undefined): number[] {
  if (text === undefined || text === '') return [];
  try {
    return readRails(text);
  } catch (error) {
    if (error instanceof RailsError)
      throw new Refusal('input.invalid', error.message, {
        errors: [{ pointer: '/rails', code: error.problem, detail: error.message }],
      });
    throw error;
  }
}
