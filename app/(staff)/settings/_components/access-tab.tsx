'use client';

import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { ConfirmDialog } from '@/components/ui/confirm';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import type { AccessRow, WithoutAccess } from '@/db/access';
import { formatInstant } from '@/lib/format';
import { shutOut } from '../actions';
import { InviteForms } from './invite-forms';

type AccessTabProps = { accounts: readonly AccessRow[]; without: readonly WithoutAccess[]; locale: string; zone: string };

const ROLE_WORDS: Record<string, string> = { owner: 'owner', desk: 'front desk', teacher: 'teacher', lead: 'lead teacher', guardian: 'guardian', student: 'student' };
const rolesOf = ({ roles }: AccessRow) => roles.split(',').filter((role) => role !== '').map((role) => ROLE_WORDS[role] ?? role).join(', ');

export function AccessTab({ accounts, without, locale, zone }: AccessTabProps) {
  const [ending, setEnding] = useState<AccessRow | null>(null);
  const [pending, startTransition] = useTransition();
  const end = () => startTransition(async () => {
    const result = ending ? await shutOut({ userId: ending.userId }).catch(() => null) : null;
    if (result?.ok) toast.success('The access has ended.');
    else toast.error(result?.message ?? 'This did not reach the school. Press again.');
    setEnding(null);
  });
  const columns: Column<AccessRow>[] = [
    { id: 'name', header: 'Person', isTitle: true, value: ({ name }) => name },
    { id: 'email', header: 'Signs in with', value: ({ email }) => email },
    { id: 'roles', header: 'Roles', value: rolesOf },
    { id: 'state', header: 'State', value: ({ state }) => state, cell: ({ state }) => <Chip tone={state === 'live' ? 'ok' : state === 'invited' ? 'wait' : 'neutral'}>{{ live: 'may sign in', invited: 'invited', disabled: 'ended' }[state]}</Chip> },
    { id: 'last', header: 'Last signed in', value: ({ lastSignInAt }) => lastSignInAt, cell: ({ lastSignInAt }) => (lastSignInAt === null ? 'never' : formatInstant(lastSignInAt, { locale, zone })) },
    { id: 'end', header: '', value: () => '', cell: (row) => (row.state === 'disabled' ? null : <Button kind="quiet" onClick={() => setEnding(row)}>End access</Button>) },
  ];
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_340px]">
      <Sheet flush><DataTable label="accounts" rows={accounts} columns={columns} rowKey={({ userId }) => userId} initialSort={{ id: 'name' }} empty={<EmptyState title="Nobody can sign in" />} /></Sheet>
      <InviteForms without={without} />
      {ending ? <ConfirmDialog open onOpenChange={(open) => { if (!open) setEnding(null); }} title={`End the access of ${ending.name}`} kind="danger" confirmLabel="End access" pending={pending} onConfirm={end}
        consequences={['Signed out on every device at once.', 'Lessons, marks, bills and pay stay as they are.', 'An invitation can open it again.']} /> : null}
    </div>
  );
}
