'use client';

import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { FormEvent } from 'react';
import { toast } from 'sonner';
import { ApiProblem, callApi, newIdempotencyKey } from '@/lib/client/api';
import { fieldNameOf } from '@/lib/client/forms';
import { ROLE_NAMES, ROLES } from '@/lib/domain/roles';
import type { Role } from '@/lib/domain/roles';
import { userEndpoints } from '@/lib/schemas/users';
import type { User } from '@/lib/schemas/users';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { Checkbox, NumberInput, TextInput } from '../ui/inputs';

/** Opens an account, or changes one. */
export function AccountForm({ user, onDone }: { readonly user: User | null; readonly onDone: () => void }) {
  const cache = useQueryClient();
  const [name, setName] = useState(user?.name ?? '');
  const [email, setEmail] = useState(user?.email ?? '');
  const [password, setPassword] = useState('');
  const [roles, setRoles] = useState<readonly Role[]>(user?.roles ?? []);
  const [limit, setLimit] = useState(String((user?.approvalLimitMinor ?? 0) / 100));
  const [isDisabled, setDisabled] = useState(user?.isDisabled ?? false);
  const [problem, setProblem] = useState<ApiProblem | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [key] = useState(newIdempotencyKey);
  const errorOf = (field: string) =>
    problem?.errors.find(({ pointer }) => fieldNameOf(pointer).split('.')[0] === field)?.detail;

  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    setProblem(null);
    const approvalLimitMinor = Math.round(Number(limit.replace(',', '.')) * 100);
    const shared = { name, roles: [...roles], approvalLimitMinor };
    try {
      if (user)
        await callApi(userEndpoints.update, {
          params: { id: user.id },
          body: { ...shared, isDisabled, version: user.version },
          idempotencyKey: key,
        });
      else await callApi(userEndpoints.create, { body: { ...shared, email, password }, idempotencyKey: key });
      await cache.invalidateQueries({ queryKey: [userEndpoints.list.path, 'list'] });
      toast(user ? `${name} changed` : `${name} can sign in now`);
      onDone();
    } catch (error) {
      if (!(error instanceof ApiProblem)) throw error;
      setProblem(error);
    } finally {
      setBusy(false);
    }
  };

  return (
    <form onSubmit={(event) => void save(event)} noValidate className="grid gap-4">
      {problem && problem.errors.length === 0 && <Alert tone="stop" title={problem.message} />}
      <TextInput
        id="account-name"
        label="Name"
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={errorOf('name')}
      />
      {!user && (
        <>
          <TextInput
            id="account-email"
            label="E-mail"
            type="email"
            value={email}
            onChange={(event) => setEmail(event.target.value)}
            error={errorOf('email')}
          />
          <TextInput
            id="account-password"
            label="First password"
            type="password"
            autoComplete="new-password"
            value={password}
            onChange={(event) => setPassword(event.target.value)}
            hint="At least 12 characters. They change it under “Your account”."
            error={errorOf('password')}
          />
        </>
      )}
      <fieldset>
        <legend className="font-semibold">Roles</legend>
        {ROLES.map((role) => (
          <Checkbox
            key={role}
            id={`role-${role}`}
            label={ROLE_NAMES[role]}
            checked={roles.includes(role)}
            onChange={(event) =>
              setRoles(event.target.checked ? [...roles, role] : roles.filter((other) => other !== role))
            }
          />
        ))}
        {errorOf('roles') && <p className="text-sm font-semibold text-signal">{errorOf('roles')}</p>}
      </fieldset>
      <NumberInput
        id="account-limit"
        label="May approve orders up to"
        unit="GBP"
        value={limit}
        onChange={(event) => setLimit(event.target.value)}
        error={errorOf('approvalLimitMinor')}
      />
      {user && (
        <Checkbox
          id="account-closed"
          label="Closed"
          hint="Cannot sign in; what they did stays in the record."
          checked={isDisabled}
          onChange={(event) => setDisabled(event.target.checked)}
        />
      )}
      <Button type="submit" look="primary" isBusy={isBusy} busyText="Saving …">
        {user ? 'Save' : 'Open the account'}
      </Button>
    </form>
  );
}
