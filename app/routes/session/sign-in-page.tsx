import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { Navigate, useSearchParams } from 'react-router-dom';
import type { z } from 'zod';
import { signIn } from '#contract/people.ts';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { demoAccountsQuery } from '#app/features/session/demo-accounts.ts';
import { sessionQuery } from '#app/features/session/session.ts';
import { signInMutation } from '#app/features/session/sign-in.ts';
import { pageAfterSignIn } from '../shell/signed-in.tsx';
import { DemoAccounts } from './demo-accounts.tsx';
import { DoorLayout } from './door-layout.tsx';

type Values = z.input<typeof signIn.body>;

export function Page() {
  const session = useQuery(sessionQuery);
  const demo = useQuery({ ...demoAccountsQuery, enabled: session.data?.demo === true });
  const [search] = useSearchParams();
  const [invited, setInvited] = useState(false);
  const queryClient = useQueryClient();
  const enter = useMutation(signInMutation(queryClient));
  const form = useForm<Values, unknown, z.output<typeof signIn.body>>({
    resolver: zodResolver(signIn.body),
    defaultValues: { email: '', password: '' },
  });
  const { errors } = form.formState;
  const email = useWatch({ control: form.control, name: 'email' });

  if (session.data?.person) return <Navigate to={pageAfterSignIn(search.get('to'))} replace />;
  const fillIn = (account: { email: string; password: string }) => {
    form.reset({ email: account.email, password: account.password });
    form.setFocus('password');
  };
  const accounts = demo.data ?? [];
  return (
    <DoorLayout
      title="Foothold"
      lead="Plan where recovery starts."
      foot={accounts.length > 0 && 'The demo’s places, people and data are invented.'}
    >
      <p className="mt-5 mb-2 text-[15px] leading-[1.46]">
        When drought kills a marsh, what grows back creeps sideways from what survived. Bring your site’s
        rasters, draw what you could do, and see by when the ground closes, and what waiting would bring.
      </p>
      <form noValidate onSubmit={(event) => void form.handleSubmit((values) => enter.mutate(values))(event)}>
        <TextField
          className="mt-3.5"
          label="E-mail"
          type="email"
          autoComplete="username"
          error={errors.email?.message}
          {...form.register('email')}
        />
        <TextField
          className="mt-3.5"
          label="Password"
          type="password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...form.register('password')}
        />
        {enter.isError && <ProblemNotice className="mt-4" error={enter.error} />}
        <div className="mt-4 flex flex-wrap items-center gap-x-4.5 gap-y-2">
          <Button type="submit" kind="primary" busy={enter.isPending} busyLabel="Signing in">
            Sign in
          </Button>
          <WordButton aria-expanded={invited} onClick={() => setInvited(!invited)}>
            I was invited
          </WordButton>
          <WordLink to="/forgot" plain>
            Forgot password
          </WordLink>
        </div>
        {invited && (
          <p className="mt-3 border-l-[6px] border-ink pl-3.5 text-note text-ink-2">
            Open the link in your invite e-mail: it brings you into the team and lets you choose a password.
            If it has run out, ask an admin of the team to invite you again.
          </p>
        )}
      </form>
      {accounts.length > 0 && <DemoAccounts accounts={accounts} filledIn={email} onFillIn={fillIn} />}
    </DoorLayout>
  );
}
