'use client';
/** One's own API tokens: client because a new one is shown once and never again. */
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CopyText } from '@/components/ui/copy-text';
import { EmptyState } from '@/components/ui/empty-state';
import { SelectField, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { dayText } from '@/components/workshop/clock-time';
import { useCommand } from '@/lib/api/client';
import type { createToken, revokeToken } from '@/lib/workshop/api-tokens';

interface Token {
  readonly id: string;
  readonly name: string;
  readonly scope: 'read' | 'write';
  readonly createdAt: string;
  readonly expiresAt: string;
}

export function Tokens({ tokens }: { readonly tokens: readonly Token[] }) {
  const router = useRouter();
  const [name, setName] = useState('');
  const [scope, setScope] = useState<'read' | 'write'>('read');
  const create = useCommand<typeof createToken>('POST /tokens');
  const revoke = useCommand<typeof revokeToken>('POST /tokens/{tokenId}/revoke');
  function submit(event: FormEvent) {
    event.preventDefault();
    create.mutate({ name, scope }, { onSuccess: () => router.refresh() });
  }
  const problem = create.error ?? revoke.error;
  return (
    <div className="flex max-w-[48rem] flex-col gap-6">
      {problem ? (
        <Notice tone="stop" announce title="Nothing was changed">
          {problem.details.detail}
        </Notice>
      ) : null}
      {create.data ? (
        <Notice tone="good" announce title="Copy it now; it is not shown again">
          <CopyText text={create.data.token} label="Copy the token" />
        </Notice>
      ) : null}
      {tokens.length === 0 ? (
        <EmptyState title="No tokens yet">A token lets a script of yours do what you may do.</EmptyState>
      ) : (
        <Table label="Your API tokens" stacked>
          <TableHead>
            <HeadCell>Name</HeadCell>
            <HeadCell>May</HeadCell>
            <HeadCell>Made</HeadCell>
            <HeadCell>Until</HeadCell>
            <HeadCell>Change</HeadCell>
          </TableHead>
          <TableBody>
            {tokens.map((token) => (
              <TableRow key={token.id}>
                <Cell label="Name">{token.name}</Cell>
                <Cell label="May">{token.scope === 'write' ? 'read and write' : 'read'}</Cell>
                <Cell label="Made">{dayText(token.createdAt)}</Cell>
                <Cell label="Until">{dayText(token.expiresAt)}</Cell>
                <Cell label="Change">
                  <Button
                    size="small"
                    kind="danger"
                    busy={revoke.isPending}
                    busyWord="Revoking …"
                    onClick={() => revoke.mutate({ tokenId: token.id }, { onSuccess: () => router.refresh() })}
                  >
                    Revoke<span className="sr-only"> {token.name}</span>
                  </Button>
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
      )}
      <form onSubmit={submit} className="flex max-w-[30rem] flex-col gap-3" aria-label="New token">
        <TextField label="What it is for" required value={name} onChange={(event) => setName(event.target.value)} />
        <SelectField
          label="It may"
          value={scope}
          options={[
            { value: 'read', label: 'read' },
            { value: 'write', label: 'read and write' },
          ]}
          onChange={(event) => setScope(event.target.value === 'write' ? 'write' : 'read')}
        />
        <div>
          <Button type="submit" kind="primary" busy={create.isPending} busyWord="Making …">
            Make a token
          </Button>
        </div>
      </form>
    </div>
  );
}
