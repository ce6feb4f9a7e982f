/** Inviting somebody into the workshop, taking it back, and accepting: by mail, single use, for a week. */
import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { withScope } from '@/db/client';
import { invitation, membership, person, workshop } from '@/db/schema/people';
import { id, instant, words } from '@/lib/api/fields';
import { notFound, Refusal } from '@/lib/api/problem';
import { command, open } from '@/lib/api/use-case';
import { ROLES } from '@/lib/auth/actor';
import { letter, ownUrl } from '@/lib/auth/auth-mail';
import { hashToken, newToken } from '@/lib/auth/one-time-token';
import { hashPassword, passwordFits } from '@/lib/auth/password';
import { countTry } from '@/lib/auth/rate-limit';
import { email } from './ask-for-link';
import { newPassword, token } from './set-password';

const INVITATION_DAYS = 7;
/** Open invitations of one workshop; more is a mistake or an abuse of the mailer. */
const MOST_OPEN = 50;

export const roles = () =>
  z
    .array(z.enum(ROLES))
    .min(1, 'choose at least one role')
    .max(4)
    .refine((list) => new Set(list).size === list.length, 'names a role twice');

export const invitePerson = command({
  name: 'people.invite',
  http: 'POST /invitations',
  summary: 'Invite somebody by e-mail, with their roles.',
  roles: ['lead'],
  input: z.strictObject({ email: email(), roles: roles() }),
  output: z.object({ id: id(), expiresAt: instant() }),
  async run({ tx, actor, input, enqueue, record }) {
    const [member] = await tx
      .select({ id: person.id })
      .from(membership)
      .innerJoin(person, eq(person.id, membership.personId))
      .where(
        and(eq(membership.workshopId, actor.workshopId), eq(person.email, input.email), isNull(membership.endedAt)),
      );
    if (member) throw new Refusal('conflict', 'That person is in the workshop already; change their roles instead.');
    const openOnes = await tx
      .select({ id: invitation.id })
      .from(invitation)
      .where(
        and(
          eq(invitation.workshopId, actor.workshopId),
          isNull(invitation.acceptedAt),
          isNull(invitation.withdrawnAt),
          gt(invitation.expiresAt, new Date()),
        ),
      );
    if (openOnes.length >= MOST_OPEN)
      throw new Refusal('rule.forbids', `There are ${MOST_OPEN} open invitations. Take some back first.`);
    const secret = newToken();
    const expiresAt = new Date(Date.now() + INVITATION_DAYS * 86_400_000);
    const [made] = await tx
      .insert(invitation)
      .values({
        workshopId: actor.workshopId,
        email: input.email,
        roles: input.roles,
        tokenHash: hashToken(secret),
        invitedBy: actor.personId,
        expiresAt,
      })
      .returning({ id: invitation.id });
    if (!made) throw new Error('the insert returned no row');
    await enqueue({
      queue: 'send-mail',
      payload: {
        to: input.email,
        subject: `${actor.personName} invites you to ${actor.workshopName}`,
        text: letter(
          'there',
          [`${actor.personName} invites you to ${actor.workshopName} as ${input.roles.join(' and ')}.`, 'Accept here:'],
          ownUrl(`/invitation#${secret}`),
          [`The link holds for ${INVITATION_DAYS} days and works once.`],
        ),
        cause: `invitation:${made.id}`,
      },
    });
    record(made.id, { email: input.email, roles: input.roles });
    return { id: made.id, expiresAt: expiresAt.toISOString() };
  },
});

export const withdrawInvitation = command({
  name: 'people.withdraw-invitation',
  http: 'POST /invitations/{invitationId}/withdraw',
  summary: 'Take an open invitation back; its link stops working.',
  roles: ['lead'],
  input: z.strictObject({ invitationId: id() }),
  output: z.object({ id: id() }),
  async run({ tx, actor, input, record }) {
    const [row] = await tx
      .update(invitation)
      .set({ withdrawnAt: new Date() })
      .where(
        and(
          eq(invitation.workshopId, actor.workshopId),
          eq(invitation.id, input.invitationId),
          isNull(invitation.acceptedAt),
          isNull(invitation.withdrawnAt),
        ),
      )
      .returning({ id: invitation.id });
    if (!row) throw notFound('open invitation');
    record(row.id);
    return row;
  },
});

async function openInvitation(tx: Parameters<Parameters<typeof withScope>[1]>[0], secret: string) {
  const [row] = await tx
    .select({
      workshopId: invitation.workshopId,
      id: invitation.id,
      email: invitation.email,
      roles: invitation.roles,
      workshopName: workshop.name,
    })
    .from(invitation)
    .innerJoin(workshop, eq(workshop.id, invitation.workshopId))
    .where(
      and(
        eq(invitation.tokenHash, hashToken(secret)),
        isNull(invitation.acceptedAt),
        isNull(invitation.withdrawnAt),
        gt(invitation.expiresAt, new Date()),
      ),
    )
    .for('update', { of: invitation });
  if (!row)
    throw new Refusal('not-found', 'This invitation was used already, taken back, or is too old. Ask for a new one.');
  return row;
}

export const lookAtInvitation = open({
  name: 'people.look-at-invitation',
  http: 'POST /invitations/look',
  summary: 'What an invitation link offers, and whether its address has an account already.',
  input: z.strictObject({ token: token() }),
  output: z.object({
    email: z.string(),
    roles: z.array(z.enum(ROLES)),
    workshopName: z.string(),
    hasAccount: z.boolean(),
  }),
  async run({ input, address }) {
    await countTry('token', hashToken(input.token), address);
    return withScope('auth', async (tx) => {
      const found = await openInvitation(tx, input.token);
      const [known] = await tx.select({ id: person.id }).from(person).where(eq(person.email, found.email));
      return {
        email: found.email,
        roles: z.array(z.enum(ROLES)).parse(found.roles),
        workshopName: found.workshopName,
        hasAccount: known !== undefined,
      };
    });
  },
});

export const acceptInvitation = open({
  name: 'people.accept-invitation',
  http: 'POST /invitations/accept',
  summary: 'Accept an invitation: a new account with name and password, or an existing one with its password.',
  input: z.strictObject({ token: token(), name: words(80).optional(), password: newPassword() }),
  output: z.object({ email: z.string() }),
  async run({ input, address }) {
    await countTry('token', hashToken(input.token), address);
    const passwordHash = await hashPassword(input.password);
    return withScope('auth', async (tx) => {
      const found = await openInvitation(tx, input.token);
      const [known] = await tx
        .select({ id: person.id, passwordHash: person.passwordHash })
        .from(person)
        .where(eq(person.email, found.email));
      let personId: string;
      if (known) {
        if (!(await passwordFits(input.password, known.passwordHash)))
          throw new Refusal('not-allowed', 'That is not the password of your account.');
        personId = known.id;
      } else {
        if (input.name === undefined)
          throw new Refusal('input.invalid', 'Your name is missing.', {
            errors: [{ pointer: '/name', code: 'required', detail: 'Your name is missing.' }],
          });
        const [made] = await tx
          .insert(person)
          .values({ email: found.email, name: input.name, passwordHash })
          .returning({ id: person.id });
        if (!made) throw new Error('the insert returned no row');
        personId = made.id;
      }
      await tx
        .insert(membership)
        .values({ workshopId: found.workshopId, personId, roles: found.roles })
        .onConflictDoUpdate({
          target: [membership.workshopId, membership.personId],
          set: { roles: found.roles, endedAt: null },
        });
      await tx
        .update(invitation)
        .set({ acceptedAt: new Date() })
        .where(and(eq(invitation.workshopId, found.workshopId), eq(invitation.id, found.id)));
      return { email: found.email };
    });
  },
});
