import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { acceptInvite, passwordSchema } from '#contract/people.ts';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { acceptInviteMutation, inviteQuery } from '#app/features/session/invite.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { DoorLayout } from './door-layout.tsx';
import { passwordHint } from './password-hint.ts';

export function Page() {
  const { token = '' } = useParams();
  const invite = useQuery(inviteQuery(token));
  return (
    <DoorLayout
      title="Join"
      lead={invite.data && `${invite.data.teamName} asks you to join as ${invite.data.role}.`}
    >
      <div className="mt-6">
        {invite.isPending && <LoadingLines label="Opening your invite" />}
        {invite.isError && (
          <>
            <ProblemNotice error={invite.error} title="This invite does not open." />
            <p className="mt-4">
              <WordLink to="/sign-in">To sign in</WordLink>
            </p>
          </>
        )}
        {invite.isSuccess && (
          <JoinForm token={token} email={invite.data.email} hasAccount={invite.data.hasAccount} />
        )}
      </div>
    </DoorLayout>
  );
}

/** A new account needs a name and a password that will do; one that exists only shows that it is yours. */
const newAccount = acceptInvite.body.extend({
  name: acceptInvite.body.shape.name.unwrap(),
  password: passwordSchema,
});
const presentAccount = z.strictObject({
  name: z.string().transform(() => undefined),
  password: acceptInvite.body.shape.password,
});

function JoinForm({ token, email, hasAccount }: { token: string; email: string; hasAccount: boolean }) {
  const navigate = useNavigate();
  const accept = useMutation(acceptInviteMutation(useQueryClient(), token));
  const [problem, setProblem] = useState<string>();
  const form = useForm<{ name: string; password: string }, unknown, z.output<typeof acceptInvite.body>>({
    resolver: zodResolver(hasAccount ? presentAccount : newAccount),
    defaultValues: { name: '', password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await accept.mutateAsync(values);
      await navigate('/');
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="grid gap-3.5" onSubmit={(event) => void submit(event)}>
      <p>
        {hasAccount ? 'You have an account here: give its password. ' : 'Your account will be '}
        <span className="font-mono text-[13px]">{email}</span>.
      </p>
      {!hasAccount && (
        <TextField
          label="Your name"
          autoComplete="name"
          error={errors.name?.message}
          {...form.register('name')}
        />
      )}
      <TextField
        label={hasAccount ? 'Your password' : 'Choose a password'}
        type="password"
        autoComplete={hasAccount ? 'current-password' : 'new-password'}
        hint={hasAccount ? undefined : passwordHint}
        error={errors.password?.message}
        {...form.register('password')}
      />
      {problem !== undefined && <Notice kind="problem">{problem}</Notice>}
      <div>
        <Button type="submit" kind="primary" busy={isSubmitting} busyLabel="Joining">
          Join the team
        </Button>
      </div>
    </form>
  );
}
