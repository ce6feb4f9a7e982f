/** Bearer tokens for the API: a person's own, with their own roles, shown once. */
import 'server-only';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { z } from 'zod';
import type { Tx } from '@/db/client';
import { apiToken } from '@/db/schema/people';
import { id, instant, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, query } from '@/lib/api/use-case';
import { hashToken, newToken } from '@/lib/auth/one-time-token';

const MOST_TOKENS = 20;
const TOKEN_DAYS = 180;

/** Makes a token; only its hash is kept. Also used by the development command `npm run token`. */
export async function issueToken(
  tx: Tx,
  owner: { workshopId: string; personId: string },
  name: string,
  scope: 'read' | 'write',
): Promise<{ id: string; token: string; expiresAt: Date }> {
  const token = newToken();
  const expiresAt = new Date(Date.now() + TOKEN_DAYS * 86_400_000);
  const [row] = await tx
    .insert(apiToken)
    .values({ ...owner, name, scope, tokenHash: hashToken(token), expiresAt })
    .returning({ id: apiToken.id });
  if (!row) throw new Error('the insert returned no row');
  return { id: row.id, token, expiresAt };
}

const openTokensOf = (workshopId: string, personId: string) =>
  and(eq(apiToken.workshopId, workshopId), eq(apiToken.personId, personId), isNull(apiToken.revokedAt));

export const createToken = command({
  name: 'tokens.create',
  http: 'POST /tokens',
  summary: 'Make an API token of your own. It is shown once.',
  roles: 'everyone',
  input: z.strictObject({ name: words(80), scope: z.enum(['read', 'write']) }),
  output: z.object({ id: id(), token: z.string(), expiresAt: instant() }),
  async run({ tx, actor, input, record }) {
    if (actor.via === 'token') throw new Refusal('not-allowed', 'A token can’t make another one; sign in for that.');
    const held = await tx
      .select({ id: apiToken.id })
      .from(apiToken)
      .where(openTokensOf(actor.workshopId, actor.personId));
    if (held.length >= MOST_TOKENS)
      throw new Refusal('rule.forbids', `You have ${MOST_TOKENS} tokens. Revoke one first.`);
    const made = await issueToken(
      tx,
      { workshopId: actor.workshopId, personId: actor.personId },
      input.name,
      input.scope,
    );
    record(made.id, { name: input.name, scope: input.scope });
    return { id: made.id, token: made.token, expiresAt: made.expiresAt.toISOString() };
  },
});

export const listTokens = query({
  name: 'tokens.list',
  http: 'GET /tokens',
  summary: 'List your own API tokens.',
  roles: 'everyone',
  input: z.strictObject({}),
  output: z.array(
    z.object({
      id: id(),
      name: z.string(),
      scope: z.enum(['read', 'write']),
      createdAt: instant(),
      expiresAt: instant(),
    }),
  ),
  async run({ tx, actor }) {
    const rows = await tx
      .select()
      .from(apiToken)
      .where(openTokensOf(actor.workshopId, actor.personId))
      .orderBy(desc(apiToken.createdAt))
      .limit(MOST_TOKENS);
    return rows.map((row) => ({
      id: row.id,
      name: row.name,
      scope: row.scope === 'read' ? ('read' as const) : ('write' as const),
      createdAt: row.createdAt.toISOString(),
      expiresAt: row.expiresAt.toISOString(),
    }));
  },
});

export const revokeToken = command({
  name: 'tokens.revoke',
  http: 'POST /tokens/{tokenId}/revoke',
  summary: 'Revoke one of your API tokens at once.',
  roles: 'everyone',
  input: z.strictObject({ tokenId: id() }),
  output: z.object({ id: id() }),
  async run({ tx, actor, input, record }) {
    const [row] = await tx
      .update(apiToken)
      .set({ revokedAt: new Date() })
      .where(and(openTokensOf(actor.workshopId, actor.personId), eq(apiToken.id, input.tokenId)))
      .returning({ id: apiToken.id });
    if (!row) throw notFound('token');
    record(row.id);
    return row;
  },
});
