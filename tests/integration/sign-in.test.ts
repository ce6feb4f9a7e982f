/** The ways in: password, mailed link, invitation, reset, API token; and how each ends. */
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase, withScope, withWorkshop } from '@/db/client';
import { newId } from '@/db/schema/new-id';
import { membership, person } from '@/db/schema/people';
import { credentialsOf } from '@/lib/auth/credentials';
import { hashPassword } from '@/lib/auth/password';
import { signInByLink, signInByPassword } from '@/lib/auth/sign-in';
import { perform } from '@/lib/api/perform';
import { createToken, revokeToken } from '@/lib/workshop/api-tokens';
import { askForPasswordReset, askForSignInLink } from '@/lib/workshop/ask-for-link';
import { acceptInvitation, invitePerson, withdrawInvitation } from '@/lib/workshop/invite-person';
import { setPassword } from '@/lib/workshop/set-password';
import { whoAmI } from '@/lib/workshop/who-am-i';
import { listPeople } from '@/lib/workshop/list-people';
import { createCircuit } from '@/lib/circuits/create-circuit';
import { act, makeWorkshop, type TestWorkshop } from '../support/workshop';

const PASSWORD = 'the right pass phrase';
let shop: TestWorkshop;
let personId: string;
let email: string;

beforeAll(async () => {
  process.env.NEXTAUTH_URL ??= 'http://127.0.0.1:4700';
  shop = await makeWorkshop('Signing in');
  personId = newId();
  email = `${personId}@example.invalid`;
  const passwordHash = await hashPassword(PASSWORD);
  await withScope('auth', (tx) => tx.insert(person).values({ id: personId, email, name: 'Somebody', passwordHash }));
  await withWorkshop(shop.id, (tx) =>
    tx.insert(membership).values({ workshopId: shop.id, personId, roles: ['builder'] }),
  );
});
afterAll(closeDatabase);

/** Each test comes from another address of the documentation's range (RFC 5737), so that one's tries don't bind another. */
let addresses = 0;
const somewhere = (): string => `192.0.2.${(addresses += 1)}`;
const openly = async <U extends Parameters<typeof perform>[0]>(useCase: U, input: unknown) =>
  (await perform(useCase, { credentials: null, input, requestId: newId(), idempotencyKey: null, address: somewhere() }))
    .output;

/** The secret in the newest mail to an address, wherever it waits to be sent; null where none does. */
async function mailedSecret(to: string): Promise<string | null> {
  type Waiting = { payload: { to: string; text: string } };
  const own = await withScope('auth', (tx) =>
    tx.execute<Waiting>(sql`select payload from auth_mail order by created_at desc, id desc limit 200`),
  );
  const ours = await withWorkshop(shop.id, (tx) =>
    tx.execute<Waiting>(sql`select payload from outbox where queue = 'send-mail' order by sequence desc limit 200`),
  );
  const mail = [...own.rows, ...ours.rows].find((row) => row.payload.to === to);
  return /#([\w-]{43})/.exec(mail?.payload.text ?? '')?.[1] ?? null;
}

describe('a password', () => {
  it('is kept as argon2id with 19 MiB, two passes, one lane', async () => {
    expect(await hashPassword('whatever it may be')).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  it('lets its owner in, nobody with another, and says nothing of addresses that have no account', async () => {
    expect(await signInByPassword(email.toUpperCase(), PASSWORD, somewhere())).toMatchObject({
      id: personId,
      workshopId: shop.id,
    });
    expect(await signInByPassword(email, 'the wrong pass phrase', somewhere())).toBeNull();
    expect(await signInByPassword('nobody@example.invalid', PASSWORD, somewhere())).toBeNull();
  });

  it('may be tried so often and then no more for a while, whatever the address it comes from', async () => {
    const target = `limited.${newId()}@example.invalid`;
    let refused = 0;
    for (let attempt = 0; attempt < 30; attempt += 1) {
      await signInByPassword(target, 'guess', somewhere()).catch((error: { code?: string }) => {
        expect(error.code).toBe('too-many');
        refused += 1;
      });
    }
    expect(refused).toBeGreaterThan(0);
    expect(refused).toBeLessThan(30);
  });
});

describe('a mailed link', () => {
  it('signs in once', async () => {
    await openly(askForSignInLink, { email });
    const secret = (await mailedSecret(email)) ?? '';
    expect(await signInByLink(secret)).toMatchObject({ id: personId });
    expect(await signInByLink(secret)).toBeNull();
    expect(await signInByLink('x'.repeat(43))).toBeNull();
  });

  it('does not sign in when its 20 minutes are over', async () => {
    await openly(askForSignInLink, { email });
    const secret = (await mailedSecret(email)) ?? '';
    expect(secret).toHaveLength(43);
    await withScope('auth', (tx) =>
      tx.execute(
        sql`update one_time_link set expires_at = now() - interval '1 second' where person_id = ${personId} and used_at is null`,
      ),
    );
    expect(await signInByLink(secret)).toBeNull();
  });

  it('is answered alike for an address without an account, and goes nowhere', async () => {
    const known = await openly(askForSignInLink, { email });
    const unknown = await openly(askForSignInLink, { email: 'nobody.at.all@example.invalid' });
    expect(unknown).toEqual(known);
    expect(await mailedSecret('nobody.at.all@example.invalid')).toBeNull();
  });
});

describe('a password reset', () => {
  it('sets the new password, uses up its link and ends every session', async () => {
    const before = await signInByPassword(email, PASSWORD, somewhere());
    const session = {
      via: 'session' as const,
      personId,
      workshopId: shop.id,
      sessionEpoch: before?.sessionEpoch ?? -1,
    };
    expect(await act(whoAmI, session, {})).toMatchObject({ roles: ['builder'] });
    await openly(askForPasswordReset, { email });
    const token = (await mailedSecret(email)) ?? '';
    await expect(openly(setPassword, { token, password: 'short' })).rejects.toMatchObject({ code: 'input.invalid' });
    await openly(setPassword, { token, password: 'another pass phrase' });
    await expect(openly(setPassword, { token, password: 'yet another phrase' })).rejects.toMatchObject({
      code: 'not-found',
    });
    await expect(act(whoAmI, session, {})).rejects.toMatchObject({ code: 'signed-out' });
    expect(await signInByPassword(email, PASSWORD, somewhere())).toBeNull();
    expect(await signInByPassword(email, 'another pass phrase', somewhere())).toMatchObject({ id: personId });
  });
});

describe('an invitation', () => {
  it('makes a person with the roles it names, once; a withdrawn one makes nobody', async () => {
    const invited = `new.${newId()}@example.invalid`;
    await act(invitePerson, shop.as.lead, { email: invited, roles: ['storekeeper', 'buyer'] });
    const token = (await mailedSecret(invited)) ?? '';
    await openly(acceptInvitation, { token, name: 'New Person', password: 'a fine pass phrase' });
    const { people } = await act(listPeople, shop.as.lead, {});
    expect(people.find((one) => one.email === invited)).toMatchObject({
      name: 'New Person',
      roles: ['storekeeper', 'buyer'],
    });
    await expect(
      openly(acceptInvitation, { token, name: 'Again', password: 'a fine pass phrase' }),
    ).rejects.toMatchObject({ code: 'not-found' });

    const other = `other.${newId()}@example.invalid`;
    const made = await act(invitePerson, shop.as.lead, { email: other, roles: ['builder'] });
    await act(withdrawInvitation, shop.as.lead, { invitationId: made.id });
    await expect(
      openly(acceptInvitation, { token: await mailedSecret(other), name: 'Other', password: 'a fine pass phrase' }),
    ).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('an API token', () => {
  const bearer = (token: string) =>
    credentialsOf(
      new Request('http://localhost/', { headers: { authorization: `Bearer ${token}` } }) as Parameters<
        typeof credentialsOf
      >[0],
    );

  it('is shown once, kept only as its hash, reads or writes as it was made for, and ends when it is revoked', async () => {
    const { id, token } = await act(createToken, shop.as.builder, { name: 'script', scope: 'read' });
    const stored = await withWorkshop(shop.id, (tx) =>
      tx.execute<{ all: string }>(sql`select row_to_json(t)::text as all from api_token t where id = ${id}`),
    );
    expect(stored.rows[0]?.all).not.toContain(token);
    const credentials = await bearer(token);
    expect(await act(whoAmI, credentials, {})).toMatchObject({ roles: ['builder'] });
    await expect(act(createCircuit, credentials, { name: 'By a reader' })).rejects.toMatchObject({
      code: 'not-allowed',
    });
    await act(revokeToken, shop.as.builder, { tokenId: id });
    await expect(act(whoAmI, await bearer(token).then((one) => one ?? credentials), {})).rejects.toMatchObject({
      code: 'signed-out',
    });
  });
});
