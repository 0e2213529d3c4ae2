'use client';

import { useState } from 'react';
import { formatMoney } from '@/lib/client/format';
import { ROLE_NAMES } from '@/lib/domain/roles';
import { userEndpoints } from '@/lib/schemas/users';
import type { User } from '@/lib/schemas/users';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { ListTable } from '../ui/list-table';
import { StateMark } from '../ui/state-mark';
import { AccountForm } from './account-form';

/** The accounts, each opened for a change in a dialog over the list. */
export function AccountList() {
  const [open, setOpen] = useState<User | 'new' | null>(null);
  return (
    <>
      <p className="mb-4">
        <Button look="primary" onClick={() => setOpen('new')}>
          Open an account
        </Button>
      </p>
      <ListTable<User>
        endpoint={userEndpoints.list}
        label="Accounts"
        searchLabel="Name or e-mail"
        empty="No accounts."
        columns={[
          {
            id: 'name',
            header: 'Name',
            sortKey: 'name',
            cell: ({ name }) => <span className="font-semibold">{name}</span>,
          },
          {
            id: 'email',
            header: 'E-mail',
            sortKey: 'email',
            cell: ({ email }) => <span className="break-all">{email}</span>,
          },
          {
            id: 'roles',
            header: 'Roles',
            cell: ({ roles }) => roles.map((role) => ROLE_NAMES[role]).join(', '),
          },
          {
            id: 'limit',
            header: 'Approves up to',
            isNumeric: true,
            cell: ({ roles, approvalLimitMinor }) =>
              roles.includes('purchasing') ? formatMoney(approvalLimitMinor, 'GBP') : '–',
          },
          {
            id: 'state',
            header: 'State',
            cell: ({ isDisabled, isLocked }) => (
              <StateMark
                state={isDisabled ? 'refused' : isLocked ? 'waiting' : 'ready'}
                words={isDisabled ? 'closed' : isLocked ? 'locked for now' : 'open'}
              />
            ),
          },
          {
            id: 'change',
            header: 'Change',
            cell: (user) => (
              <Button onClick={() => setOpen(user)} aria-label={`Change ${user.name}`}>
                Change
              </Button>
            ),
          },
        ]}
      />
      <Dialog
        title={open === 'new' ? 'Open an account' : `Change ${open?.name ?? ''}`}
        isOpen={open !== null}
        onOpenChange={() => setOpen(null)}
      >
        {open !== null && <AccountForm user={open === 'new' ? null : open} onDone={() => setOpen(null)} />}
      </Dialog>
    </>
  );
}
