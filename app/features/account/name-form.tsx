import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '#app/components/button.tsx';
import { TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { changeMyName } from '#contract/people.ts';
import { showProblem } from '#app/lib/form-problem.ts';
import { changeNameMutation } from './change-account.ts';

export function NameForm({ name }: { name: string }) {
  const change = useMutation(changeNameMutation(useQueryClient()));
  const [problem, setProblem] = useState<string>();
  const form = useForm({ resolver: zodResolver(changeMyName.body), defaultValues: { name } });
  const { errors, isSubmitting, isDirty } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    setProblem(undefined);
    try {
      await change.mutateAsync(values);
      form.reset(values);
      sayDone('Name changed');
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="max-w-[440px]" onSubmit={(event) => void submit(event)}>
      <TextField
        label="Your name, as the team sees it"
        autoComplete="name"
        error={errors.name?.message}
        {...form.register('name')}
      />
      {problem !== undefined && (
        <Notice kind="problem" className="mt-3">
          {problem}
        </Notice>
      )}
      <Button type="submit" className="mt-3" disabled={!isDirty} busy={isSubmitting} busyLabel="Saving">
        Change name
      </Button>
    </form>
  );
}
