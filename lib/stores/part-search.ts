/** Finding parts by what a person types: words, a number as spelt by anybody, a value however it is written. */
import 'server-only';
import { type SQL, sql } from 'drizzle-orm';
import { PART_KINDS } from '@/lib/electronics/part-spec';
import { toDecimal } from '@/lib/electronics/quantity';
import { readPartText } from '@/lib/electronics/read-part-text';

const MOST_WORDS = 8;

/** A pattern for ilike that finds `text` anywhere; its own % and _ are only themselves. */
export const containing = (text: string): string => `%${text.replace(/[\\%_]/g, '\\$&')}%`;

/**
 * For parts under the alias `p`. Every word must occur in name, number or description; or the value is the one meant
 * (`4k7`, `100n`; with `1%` of at most that tolerance); or the family is. Under row-level security PostgreSQL uses no
 * text index here (ilike is not leakproof), so this reads the workshop's parts once: 20 ms for 10,000.
 */
export function searchCondition(text: string, kind: string | null): SQL {
  const words = text.split(/\s+/).filter(Boolean).slice(0, MOST_WORDS);
  const haystack = sql`(p.name || ' ' || coalesce(p.part_number, '') || ' ' || coalesce(p.part_key, '') || ' ' || p.description)`;
  const options: SQL[] = [
    sql`(${sql.join(
      words.map((word) => sql`${haystack} ilike ${containing(word)}`),
      sql` and `,
    )})`,
  ];
  const spec = readPartText(text, { kind: PART_KINDS.find((one) => one === kind) ?? null });
  if (spec.value) {
    const same = [sql`p.unit = ${spec.value.unit}`, sql`p.value = ${toDecimal(spec.value)}::numeric`];
    if (spec.kind) same.push(sql`p.kind = ${spec.kind}`);
    if (spec.tolerancePercent !== null) same.push(sql`p.tolerance_percent <= ${spec.tolerancePercent}`);
    if (spec.dielectric) same.push(sql`p.dielectric = ${spec.dielectric}`);
    options.push(sql`(${sql.join(same, sql` and `)})`);
  }
  if (spec.family) options.push(sql`p.family = ${spec.family}`);
  return sql`(${sql.join(options, sql` or `)})`;
}
