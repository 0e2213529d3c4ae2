'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import Link from 'next/link';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { callApi } from '@/lib/client/api';
import { showProblem } from '@/lib/client/forms';
import { accountEndpoints, resetPasswordSchema } from '@/lib/schemas/account';
import { Alert } from '../ui/alert';
import { Button } from '../ui/button';
import { TextInput } from '../ui/inputs';

export function NewPasswordForm({ token }: { readonly token: string }) {
  const [failure, setFailure] = useState<string | null>(null);
  const [isDone, setDone] = useState(false);
  const { register, handleSubmit, setError, formState } = useForm({
    resolver: zodResolver(resetPasswordSchema),
    defaultValues: { token, password: '' },
  });

  const save = handleSubmit(async (values) => {
    setFailure(null);
    try {
      await callApi(accountEndpoints.resetPassword, { body: values });
      setDone(true);
    } catch (problem) {
      setFailure(showProblem(problem, setError, ['password']));
    }
  });

  if (isDone) {
    return (
      <Alert tone="done" title="The new password is set">
        Every earlier session has ended. <Link href="/sign-in">Sign in</Link>
      </Alert>
    );
  }
  return (
    <form method="post" onSubmit={(event) => void save(event)} noValidate className="grid gap-4">
      {failure && (
        <Alert tone="stop" title={failure}>
          <Link href="/forgot-password">Ask for a new letter</Link>
        </Alert>
      )}
      <TextInput
        id="password"
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="At least 12 characters; a few words in a row are easy to keep."
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" look="primary" isBusy={formState.isSubmitting} busyText="Saving …">
        Set the password
      </Button>
    </form>
  );
}
