'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { callApi } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { accountEndpoints, changePasswordSchema } from '@/lib/schemas/account';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { TextInput } from '../ui/inputs';

export function ChangePasswordForm() {
  const [failure, setFailure] = useState<string | null>(null);
  const { register, handleSubmit, setError, reset, formState } = useForm({
    resolver: zodResolver(changePasswordSchema),
    defaultValues: { currentPassword: '', newPassword: '' },
  });

  const save = handleSubmit(async (values) => {
    setFailure(null);
    try {
      await callApi(accountEndpoints.changePassword, { body: values });
      reset();
      toast('Password changed. Your other sessions have ended.');
    } catch (problem) {
      setFailure(showProblem(problem, setError, ['currentPassword', 'newPassword']));
    }
  });

  return (
    <form method="post" onSubmit={(event) => void save(event)} noValidate className="grid gap-4">
      {failure && <Alert tone="stop" title={failure} />}
      <TextInput
        id="current"
        label="Present password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.currentPassword?.message}
        {...register('currentPassword')}
      />
      <TextInput
        id="new"
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="At least 12 characters."
        error={formState.errors.newPassword?.message}
        {...register('newPassword')}
      />
      <Button type="submit" look="primary" isBusy={formState.isSubmitting} busyText="Saving …">
        Change the password
      </Button>
    </form>
  );
}
