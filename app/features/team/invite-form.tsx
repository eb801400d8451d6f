import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { z } from 'zod';
import { Button } from '#app/components/button.tsx';
import { SelectField, TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { roles, sendInvite } from '#contract/people.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { sendInviteMutation } from './invites.ts';

export function InviteForm({ teamId }: { teamId: string }) {
  const send = useMutation(sendInviteMutation(useQueryClient(), teamId));
  const [problem, setProblem] = useState<string>();
  const form = useForm<z.input<typeof sendInvite.body>, unknown, z.output<typeof sendInvite.body>>({
    resolver: zodResolver(sendInvite.body),
    defaultValues: { email: '', role: 'manager' },
  });
  const { errors, isSubmitting } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await send.mutateAsync(values);
      sayDone(`Invited ${values.email} as ${values.role}`);
      form.reset();
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="mb-4" onSubmit={(event) => void submit(event)}>
      <div className="flex flex-wrap items-start gap-x-5 gap-y-3">
        <TextField
          className="min-w-[220px] flex-1"
          label="E-mail of whom to invite"
          type="email"
          autoComplete="off"
          error={errors.email?.message}
          {...form.register('email')}
        />
        <SelectField className="w-32" label="as" error={errors.role?.message} {...form.register('role')}>
          {roles.map((role) => (
            <option key={role}>{role}</option>
          ))}
        </SelectField>
        <Button type="submit" kind="primary" className="mt-[22px]" busy={isSubmitting} busyLabel="Sending">
          Send invite
        </Button>
      </div>
      {problem !== undefined && (
        <Notice kind="problem" className="mt-3">
          {problem}
        </Notice>
      )}
    </form>
  );
}
