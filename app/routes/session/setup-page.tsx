import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate, useParams } from 'react-router-dom';
import { completeSetup } from '#contract/people.ts';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { setupMutation, setupQuery } from '#app/features/session/setup.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { DoorLayout } from './door-layout.tsx';
import { passwordHint } from './password-hint.ts';

export function Page() {
  const { token = '' } = useParams();
  const open = useQuery(setupQuery(token));
  return (
    <DoorLayout title="Set up" lead="The first team, and you as its admin.">
      <div className="mt-6">
        {open.isPending && <LoadingLines label="Checking the link" />}
        {open.isError && (
          <>
            <ProblemNotice error={open.error} title="This link does not open." />
            <p className="mt-4">
              <WordLink to="/sign-in">To sign in</WordLink>
            </p>
          </>
        )}
        {open.isSuccess && <SetupForm token={token} />}
      </div>
    </DoorLayout>
  );
}

function SetupForm({ token }: { token: string }) {
  const navigate = useNavigate();
  const setup = useMutation(setupMutation(useQueryClient(), token));
  const [problem, setProblem] = useState<string>();
  const form = useForm({
    resolver: zodResolver(completeSetup.body),
    defaultValues: { teamName: '', name: '', email: '', password: '' },
  });
  const { errors, isSubmitting } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await setup.mutateAsync(values);
      await navigate('/');
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="grid gap-3.5" onSubmit={(event) => void submit(event)}>
      <TextField
        label="Name of the team"
        autoComplete="organization"
        error={errors.teamName?.message}
        {...form.register('teamName')}
      />
      <TextField
        label="Your name"
        autoComplete="name"
        error={errors.name?.message}
        {...form.register('name')}
      />
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register('email')}
      />
      <TextField
        label="Password"
        type="password"
        autoComplete="new-password"
        hint={passwordHint}
        error={errors.password?.message}
        {...form.register('password')}
      />
      {problem !== undefined && <Notice kind="problem">{problem}</Notice>}
      <div>
        <Button type="submit" kind="primary" busy={isSubmitting} busyLabel="Setting up">
          Make the team
        </Button>
      </div>
    </form>
  );
}
