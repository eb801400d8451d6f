import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate, useParams } from 'react-router-dom';
import { completePasswordReset } from '#contract/people.ts';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { completeResetMutation } from '#app/features/session/password-reset.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { DoorLayout } from './door-layout.tsx';
import { passwordHint } from './password-hint.ts';

export function Page() {
  const { token = '' } = useParams();
  const navigate = useNavigate();
  const [problem, setProblem] = useState<string>();
  const reset = useMutation(completeResetMutation(useQueryClient(), token));
  const form = useForm({
    resolver: zodResolver(completePasswordReset.body),
    defaultValues: { password: '' },
  });
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await reset.mutateAsync(values);
      sayDone('New password set. Sign in with it.');
      await navigate('/sign-in');
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <DoorLayout title="New password" lead="It signs you out everywhere else and revokes your access tokens.">
      <form className="mt-4" noValidate onSubmit={(event) => void submit(event)}>
        <TextField
          className="mt-3.5"
          label="New password"
          type="password"
          autoComplete="new-password"
          hint={passwordHint}
          error={form.formState.errors.password?.message}
          {...form.register('password')}
        />
        {problem !== undefined && (
          <Notice kind="problem" className="mt-4">
            {problem} <WordLink to="/forgot">Ask for another link</WordLink>
          </Notice>
        )}
        <div className="mt-4">
          <Button type="submit" kind="primary" busy={form.formState.isSubmitting} busyLabel="Setting it">
            Set the password
          </Button>
        </div>
      </form>
    </DoorLayout>
  );
}
