'use client';
/** The people table with invitations: a client component because roles are changed in place. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckboxField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useSay } from '@/components/ui/status-line';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { useCommand } from '@/lib/api/client';
import type { changeRoles, endMembership } from '@/lib/workshop/change-roles';
import type { invitePerson, withdrawInvitation } from '@/lib/workshop/invite-person';

const ROLES = ['builder', 'storekeeper', 'buyer', 'lead'] as const;
type Role = (typeof ROLES)[number];
interface Member {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly since: string;
  readonly you: boolean;
}
interface Invited {
  readonly id: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly expiresAt: string;
}

function RoleChoice({
  chosen,
  onChange,
  label,
}: {
  readonly chosen: readonly Role[];
  readonly onChange: (roles: Role[]) => void;
  readonly label: string;
}) {
  return (
    <fieldset className="flex flex-wrap gap-x-5 gap-y-1">
      <legend className="sr-only">{label}</legend>
      {ROLES.map((role) => (
        <CheckboxField
          key={role}
          label={role}
          checked={chosen.includes(role)}
          onChange={(event) =>
            onChange(event.target.checked ? [...chosen, role] : chosen.filter((one) => one !== role))
          }
        />
      ))}
    </fieldset>
  );
}

export function People({
  people,
  invitations,
  mayChange,
}: {
  readonly people: readonly Member[];
  readonly invitations: readonly Invited[];
  readonly mayChange: boolean;
}) {
  const router = useRouter();
  const say = useSay();
  const [editing, setEditing] = useState<{ personId: string; roles: Role[] } | null>(null);
  const [ending, setEnding] = useState<string | null>(null);
  const change = useCommand<typeof changeRoles>('POST /people/{personId}/roles');
  const end = useCommand<typeof endMembership>('POST /people/{personId}/end');
  const withdraw = useCommand<typeof withdrawInvitation>('POST /invitations/{invitationId}/withdraw');
  const problem = change.error ?? end.error ?? withdraw.error;
  const done = (text: string) => {
    setEditing(null);
    setEnding(null);
    say(text);
    router.refresh();
  };

  return (
    <div className="flex flex-col gap-6">
      {problem ? (
        <Notice tone="stop" announce title="Nothing was changed">
          {problem.details.detail}
        </Notice>
      ) : null}
      <Table label="People of the workshop" stacked>
        <TableHead>
          <HeadCell>Name</HeadCell>
          <HeadCell>E-mail</HeadCell>
          <HeadCell>Roles</HeadCell>
          <HeadCell>Since</HeadCell>
          {mayChange ? <HeadCell>Change</HeadCell> : null}
        </TableHead>
        <TableBody>
          {people.map((one) => (
            <TableRow key={one.personId} selected={editing?.personId === one.personId}>
              <Cell label="Name">
                <strong className="font-semibold">{one.name}</strong>
                {one.you ? <span className="text-soft"> (you)</span> : null}
              </Cell>
              <Cell label="E-mail">
                <span className="font-mono break-all">{one.email}</span>
              </Cell>
              <Cell label="Roles">
                {editing?.personId === one.personId ? (
                  <RoleChoice
                    label={`Roles of ${one.name}`}
                    chosen={editing.roles}
                    onChange={(roles) => setEditing({ personId: one.personId, roles })}
                  />
                ) : (
                  one.roles.join(', ')
                )}
              </Cell>
              <Cell label="Since">{dayText(one.since)}</Cell>
              {mayChange ? (
                <Cell label="Change">
                  {editing?.personId === one.personId ? (
                    <span className="flex flex-wrap gap-2">
                      <Button
                        kind="primary"
                        size="small"
                        busy={change.isPending}
                        busyWord="Saving …"
                        onClick={() =>
                          change.mutate(
                            { personId: one.personId, roles: editing.roles },
                            { onSuccess: () => done(`${one.name} is now ${editing.roles.join(', ')}`) },
                          )
                        }
                      >
                        Save roles
                      </Button>
                      <Button size="small" kind="quiet" onClick={() => setEditing(null)}>
                        Leave as is
                      </Button>
                    </span>
                  ) : ending === one.personId ? (
                    <span className="flex flex-wrap gap-2">
                      <Button
                        size="small"
                        kind="danger"
                        busy={end.isPending}
                        busyWord="Ending …"
                        onClick={() =>
                          end.mutate(
                            { personId: one.personId },
                            { onSuccess: () => done(`${one.name} has left the workshop`) },
                          )
                        }
                      >
                        End membership of {one.name}
                      </Button>
                      <Button size="small" kind="quiet" onClick={() => setEnding(null)}>
                        Keep
                      </Button>
                    </span>
                  ) : (
                    <span className="flex flex-wrap gap-2">
                      <Button
                        size="small"
                        onClick={() => setEditing({ personId: one.personId, roles: [...one.roles] })}
                      >
                        Change roles<span className="sr-only"> of {one.name}</span>
                      </Button>
                      {one.you ? null : (
                        <Button size="small" kind="quiet" onClick={() => setEnding(one.personId)}>
                          End<span className="sr-only"> membership of {one.name}</span>
                        </Button>
                      )}
                    </span>
                  )}
                </Cell>
              ) : null}
            </TableRow>
          ))}
        </TableBody>
      </Table>
      {invitations.length > 0 ? (
        <section aria-labelledby="invited">
          <h2 id="invited" className="mb-1 text-lead font-bold">
            Invited
          </h2>
          <Table label="Open invitations" stacked>
            <TableHead>
              <HeadCell>E-mail</HeadCell>
              <HeadCell>As</HeadCell>
              <HeadCell>Until</HeadCell>
              {mayChange ? <HeadCell>Change</HeadCell> : null}
            </TableHead>
            <TableBody>
              {invitations.map((one) => (
                <TableRow key={one.id}>
                  <Cell label="E-mail">
                    <span className="font-mono break-all">{one.email}</span>
                  </Cell>
                  <Cell label="As">{one.roles.join(', ')}</Cell>
                  <Cell label="Until">{dayText(one.expiresAt)}</Cell>
                  {mayChange ? (
                    <Cell label="Change">
                      <Button
                        size="small"
                        kind="quiet"
                        busy={withdraw.isPending}
                        busyWord="Taking back …"
                        onClick={() =>
                          withdraw.mutate(
                            { invitationId: one.id },
                            { onSuccess: () => done(`The invitation to ${one.email} was taken back`) },
                          )
                        }
                      >
                        Take back<span className="sr-only"> the invitation to {one.email}</span>
                      </Button>
                    </Cell>
                  ) : null}
                </TableRow>
              ))}
            </TableBody>
          </Table>
        </section>
      ) : null}
      {mayChange ? <InviteForm onDone={done} /> : null}
    </div>
  );
}

function InviteForm({ onDone }: { readonly onDone: (text: string) => void }) {
  const [email, setEmail] = useState('');
  const [roles, setRoles] = useState<Role[]>(['builder']);
  const invite = useCommand<typeof invitePerson>('POST /invitations');
  function submit(event: FormEvent) {
    event.preventDefault();
    invite.mutate(
      { email, roles },
      {
        onSuccess: () => {
          onDone(`An invitation went to ${email}`);
          setEmail('');
        },
      },
    );
  }
  return (
    <section aria-labelledby="invite" className="max-w-[36rem]">
      <h2 id="invite" className="mb-2 text-lead font-bold">
        Invite somebody
      </h2>
      <form onSubmit={submit} className="flex flex-col gap-3">
        {invite.error ? (
          <Notice tone="stop" announce title="No invitation was sent">
            {invite.error.details.detail}
          </Notice>
        ) : null}
        <TextField
          label="Their e-mail"
          type="email"
          required
          value={email}
          onChange={(event) => setEmail(event.target.value)}
        />
        <RoleChoice label="Roles of the person invited" chosen={roles} onChange={setRoles} />
        <div>
          <Button type="submit" kind="primary" busy={invite.isPending} busyWord="Inviting …">
            Send the invitation
          </Button>
        </div>
      </form>
    </section>
  );
}
