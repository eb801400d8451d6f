import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { changeMyPassword } from '#contract/people.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { changePasswordMutation } from './change-account.ts';

export function PasswordForm({ email }: { email: string }) {
  const change = useMutation(changePasswordMutation(useQueryClient()));
  const [problem, setProblem] = useState<string>();
  const form = useForm({
    resolver: zodResolver(changeMyPassword.body),
    defaultValues: { current: '', password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await change.mutateAsync(values);
      form.reset();
      sayDone('Password changed; other sessions are ended');
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="grid max-w-[440px] gap-3" onSubmit={(event) => void submit(event)}>
      {/* For password managers, which need to know whose password changes. */}
      <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
      <TextField
        label="Present password"
        type="password"
        autoComplete="current-password"
        error={errors.current?.message}
        {...form.register('current')}
      />
      <TextField
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="At least 10 characters. Changing it ends your other sessions; access tokens go on."
        error={errors.password?.message}
        {...form.register('password')}
      />
      {problem !== undefined && <Notice kind="problem">{problem}</Notice>}
      <div>
        <Button type="submit" busy={isSubmitting} busyLabel="Changing it">
          Change password
        </Button>
      </div>
    </form>
  );
}
