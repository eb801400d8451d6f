import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { createTeam } from '#contract/people.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { createTeamMutation } from './change-account.ts';

/** Founds a further team, with oneself as its admin. */
export function FoundTeam() {
  const create = useMutation(createTeamMutation(useQueryClient()));
  const [problem, setProblem] = useState<string>();
  const form = useForm({ resolver: zodResolver(createTeam.body), defaultValues: { name: '' } });
  const { errors, isSubmitting } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await create.mutateAsync(values);
      form.reset();
      sayDone(`${values.name} is founded; you are its admin`);
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="max-w-[440px]" onSubmit={(event) => void submit(event)}>
      <TextField
        label="Found a further team"
        hint="You become its admin. Its sites are invisible to your other teams."
        autoComplete="off"
        error={errors.name?.message}
        {...form.register('name')}
      />
      {problem !== undefined && (
        <Notice kind="problem" className="mt-3">
          {problem}
        </Notice>
      )}
      <Button type="submit" className="mt-3" busy={isSubmitting} busyLabel="Founding it">
        Found the team
      </Button>
    </form>
  );
}
