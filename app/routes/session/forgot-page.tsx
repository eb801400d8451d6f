import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { requestPasswordReset } from '#contract/people.ts';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { requestResetMutation } from '#app/features/session/password-reset.ts';
import { DoorLayout } from './door-layout.tsx';

export function Page() {
  const request = useMutation(requestResetMutation);
  const form = useForm({
    resolver: zodResolver(requestPasswordReset.body),
    defaultValues: { email: '' },
  });
  return (
    <DoorLayout title="Forgot password" lead="A link to set a new one comes by e-mail.">
      {request.isSuccess ? (
        <Notice className="mt-7" title="Look in your mail.">
          If there is an account for {request.variables.email}, a link is on its way. It works once, and not
          for long. Where no mail server is set up, the message waits in the outbox folder of whoever runs the
          server.
        </Notice>
      ) : (
        <form
          className="mt-4"
          noValidate
          onSubmit={(event) => void form.handleSubmit((values) => request.mutate(values))(event)}
        >
          <TextField
            className="mt-3.5"
            label="E-mail of your account"
            type="email"
            autoComplete="username"
            error={form.formState.errors.email?.message}
            {...form.register('email')}
          />
          {request.isError && <ProblemNotice className="mt-4" error={request.error} />}
          <div className="mt-4 flex flex-wrap items-center gap-4.5">
            <Button type="submit" kind="primary" busy={request.isPending} busyLabel="Sending">
              Send the link
            </Button>
          </div>
        </form>
      )}
      <p className="mt-6">
        <WordLink to="/sign-in">Back to sign in</WordLink>
      </p>
    </DoorLayout>
  );
}
