/**
 * Parts of the workshop for many asked-for parts at once: one statement fetches what comes into question, the checks run
 * on it in memory. By spelling, by family and the families that do the same job, by exact value, by near values on the
 * shelf, by what was decided for a part alike, and by words where nothing else was understood.
 */
import 'server-only';
import { sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import type { PartSpec } from '@/lib/electronics/part-spec';
import { toDecimal, toNumber } from '@/lib/electronics/quantity';
import { readPartText } from '@/lib/electronics/read-part-text';
import type { Check, Use } from '@/lib/electronics/stand-in/assess';
import { pass } from '@/lib/electronics/stand-in/check';
import { partKeyOf, specKeyOf } from './part-spec-schema';
import { type PartColumns, partToSpec } from './part-to-spec';
import { relatedFamilies } from './related-families';
import { compareRank, type Ranked, weighPart, type Weighed } from './weigh-part';

export interface Asked {
  readonly spec: PartSpec;
  readonly use: Use | null;
  /** Units one circuit needs; what "enough on the shelf" is measured by. */
  readonly needed: number;
  /** Weigh these parts too, whatever they are. */
  readonly partIds?: readonly string[];
}

export interface Candidate extends Ranked {
  readonly checks: readonly Check[];
}

/** Statements stay small and answers bounded however long the list. */
const ASKED_AT_ONCE = 400;
/** Half a step of E6, the coarsest series that parts are stocked in (1.0 to 1.5). */
const NEAR_BY_RATIO = 1.23;
/** More capacitance on a rail does no harm, so larger ones come into question there. */
const BULK_BY_RATIO = 2.2;
const MOST_BY_KEY = 24;
const MOST_BY_FAMILY = 48;
const MOST_BY_VALUE = 48;
const MOST_NEAR = 8;
const MOST_BY_WORDS = 6;
const NEAR_KINDS: readonly (string | null)[] = ['resistor', 'capacitor', 'inductor', 'potentiometer', 'trimmer'];

interface FoundRow extends PartColumns, Record<string, unknown> {
  readonly n: number;
  readonly id: string;
  readonly safety: boolean;
  readonly free: number;
  readonly remembered: boolean;
}

/** @returns for each asked part its candidates, best first, at most `keep` of them */
export async function findCandidates(
  tx: Tx,
  workshopId: string,
  railsVolts: readonly number[],
  asked: readonly Asked[],
  keep: number,
): Promise<Candidate[][]> {
  const answer: Candidate[][] = [];
  for (let from = 0; from < asked.length; from += ASKED_AT_ONCE) {
    const some = asked.slice(from, from + ASKED_AT_ONCE);
    const found = await fetchParts(tx, workshopId, some);
    const offers = some.map((): FoundRow[] => []);
    for (const row of found) offers[row.n]?.push(row);
    for (const [n, one] of some.entries()) {
      const ranked = (offers[n] ?? []).map((row): Candidate => {
        const weighed = weighAll(one, row, railsVolts);
        return {
          partId: row.id,
          free: row.free,
          remembered: row.remembered,
          verdict: weighed.verdict,
          checks: weighed.checks,
          deviationPercent: weighed.deviationPercent,
          outcomes: weighed.checks.map((check) => check.outcome),
        };
      });
      answer.push(ranked.sort(compareRank(one.needed)).slice(0, keep));
    }
  }
  return answer;
}

/** Against what is asked first; a part that the list itself names as an alternative needs no checks against the first. */
function weighAll({ spec, use }: Asked, row: FoundRow, rails: readonly number[]): Weighed {
  const offered = partToSpec(row);
  const weighed = weighPart(spec, offered, row.safety, { rails, use });
  if (weighed.verdict === 'same' || weighed.verdict === 'drop-in') return weighed;
  for (const alternative of spec.alternatives) {
    const named = weighPart(readPartText(alternative, { kind: spec.kind }), offered, row.safety, { rails, use });
    if (named.verdict === 'same' || named.verdict === 'drop-in') {
      const why = `The list itself names ${alternative} as an alternative.`;
      return {
        verdict: 'drop-in',
        checks: [pass('named-in-list', alternative, row.name, why), ...named.checks],
        deviationPercent: weighed.deviationPercent,
      };
    }
  }
  return weighed;
}

function searchOf({ spec, use, partIds }: Asked, n: number) {
  const named = [spec, ...spec.alternatives.map((text) => readPartText(text, { kind: spec.kind }))];
  const keys = [
    ...new Set(
      named
        .flatMap(({ partNumber }) => (partNumber === null ? [] : [partKeyOf(partNumber)]))
        .filter((key) => key !== ''),
    ),
  ];
  const families = [
    ...new Set(named.flatMap(({ family }) => (family === null ? [] : [...relatedFamilies(family), family]))),
  ];
  const value = spec.value === null ? null : toNumber(spec.value);
  const bulk = spec.kind === 'capacitor' && (use === 'decoupling' || use === 'power');
  const near = value !== null && value > 0 && NEAR_KINDS.includes(spec.kind);
  return {
    n,
    kind: spec.kind,
    keys,
    families,
    exact: spec.value === null ? null : toDecimal(spec.value),
    unit: spec.value?.unit ?? null,
    value,
    low: near ? value / NEAR_BY_RATIO : null,
    high: near ? value * (bulk ? BULK_BY_RATIO : NEAR_BY_RATIO) : null,
    words: keys.length === 0 && families.length === 0 && value === null ? spec.text.slice(0, 200) : null,
    spec_key: specKeyOf(spec),
    part_ids: partIds ?? [],
  };
}

async function fetchParts(tx: Tx, workshopId: string, asked: readonly Asked[]): Promise<FoundRow[]> {
  const searches = JSON.stringify(asked.map(searchOf));
  const free = sql`(select coalesce(sum(t.on_hand - t.reserved), 0)::int from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id)`;
  const onShelf = sql`exists (select 1 from lot t where t.workshop_id = p.workshop_id and t.part_id = p.id and t.on_hand > t.reserved)`;
  const ours = sql`p.workshop_id = ${workshopId} and p.retired_at is null`;
  const answer = await tx.execute<FoundRow>(sql`
    with asked as materialized (
      select * from jsonb_to_recordset(${searches}::jsonb)
        as a(n int, kind text, keys text[], families text[], exact numeric, unit text, value float8, low float8, high float8, words text, spec_key text, part_ids uuid[])
    ), remembered as materialized (
      select a.n, d.part_id from asked a cross join lateral (
        select part_id from decision where workshop_id = ${workshopId} and spec_key = a.spec_key order by decided_at desc, id desc limit 1) d
       where d.part_id is not null
    ), found as (
      select n, unnest(part_ids) as id from asked
      union select n, part_id from remembered
      union select a.n, k.id from asked a cross join lateral (select p.id from part p where ${ours} and p.part_key = any(a.keys) limit ${MOST_BY_KEY}) k
      union select a.n, k.id from asked a cross join lateral (
        select p.id from part p where ${ours} and p.family = any(a.families)
         order by (p.family = a.families[1]) desc, ${onShelf} desc, p.id limit ${MOST_BY_FAMILY}) k
      union select a.n, k.id from asked a cross join lateral (
        select p.id from part p where ${ours} and p.kind = a.kind and p.value_key = a.value and p.value = a.exact and p.unit = a.unit limit ${MOST_BY_VALUE}) k
      union select a.n, k.id from asked a cross join lateral (
        select p.id from part p where ${ours} and p.kind = a.kind and p.value_key > a.value and p.value_key <= a.high and p.unit = a.unit and ${onShelf}
         order by p.value_key limit ${MOST_NEAR}) k
      union select a.n, k.id from asked a cross join lateral (
        select p.id from part p where ${ours} and p.kind = a.kind and p.value_key < a.value and p.value_key >= a.low and p.unit = a.unit and ${onShelf}
         order by p.value_key desc limit ${MOST_NEAR}) k
      union select a.n, k.id from asked a cross join lateral (
        select p.id from part p
         where a.words is not null and ${ours} and p.kind = a.kind and (lower(p.name) = lower(a.words) or word_similarity(p.name, a.words) > 0.5 or word_similarity(a.words, p.name || ' ' || p.description) > 0.5)
         order by lower(p.name) = lower(a.words) desc, similarity(p.name, a.words) desc, p.id limit ${MOST_BY_WORDS}) k
    )
    select f.n, p.id, p.name, p.description, p.kind, p.part_number as "partNumber", p.family, trim_scale(p.value)::text as value, p.unit,
           p.tolerance_percent::float8 as "tolerancePercent", p.rated_volts::float8 as "ratedVolts", p.rated_watts::float8 as "ratedWatts", p.rated_amperes::float8 as "ratedAmperes",
           p.dielectric, p.technology, p.taper, p.mounting, p.package, p.safety, ${free} as free,
           exists (select 1 from remembered r where r.n = f.n and r.part_id = p.id) as remembered
      from found f join part p on p.workshop_id = ${workshopId} and p.id = f.id and p.retired_at is null
     order by f.n`);
  return answer.rows;
}
