import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '#app/components/button.tsx';
import { SelectField, TextField } from '#app/components/inputs.tsx';
import { Notice } from '#app/components/notice.tsx';
import { showProblem } from '#app/lib/form-problem.ts';
import { makeMyToken, tokenScopeSchema } from '#contract/access-tokens.ts';
import type { Session } from '#contract/people.ts';
import { makeTokenMutation } from './my-tokens.ts';
import { endDays, endOf, tokenEnds } from './token-end.ts';
import { scopeWords } from './token-words.ts';

const formSchema = z
  .object({
    name: makeMyToken.body.shape.name,
    scope: tokenScopeSchema,
    /** empty: all my teams */
    teamId: z.string(),
    end: z.enum(tokenEnds.map(({ key }) => key)),
    day: z.string(),
  })
  .refine(({ end, day }) => endOf(end, day, new Date()) !== undefined, {
    path: ['day'],
    message: 'A day from today to a year from now is expected',
  });

/** Asks what a token is for, and hands on the token that was made. */
export function TokenForm(props: {
  memberships: Session['memberships'];
  onMade: (made: { token: string; name: string }) => void;
  onCancel: () => void;
}) {
  const make = useMutation(makeTokenMutation(useQueryClient()));
  const [problem, setProblem] = useState<string>();
  const form = useForm<z.input<typeof formSchema>, unknown, z.output<typeof formSchema>>({
    resolver: zodResolver(formSchema),
    defaultValues: { name: '', scope: 'read', teamId: '', end: '90', day: '' },
  });
  const { errors, isSubmitting } = form.formState;
  const end = useWatch({ control: form.control, name: 'end' });
  const days = endDays(new Date());
  const submit = form.handleSubmit(async ({ name, scope, teamId, end, day }) => {
    setProblem(undefined);
    try {
      const expiresAt = endOf(end, day, new Date())!;
      const { token } = await make.mutateAsync({ name, scope, teamId: teamId || null, expiresAt });
      props.onMade({ token, name });
    } catch (error) {
      setProblem(showProblem(form, error));
    }
  });
  return (
    <form noValidate className="grid max-w-[440px] gap-3" onSubmit={(event) => void submit(event)}>
      <TextField
        label="What the token is for"
        hint="Such as the script that will use it."
        autoComplete="off"
        autoFocus
        error={errors.name?.message}
        {...form.register('name')}
      />
      <div className="grid gap-3 sm:grid-cols-2">
        <SelectField label="It may" error={errors.scope?.message} {...form.register('scope')}>
          {tokenScopeSchema.options.map((scope) => (
            <option key={scope} value={scope}>
              {scopeWords[scope]}
            </option>
          ))}
        </SelectField>
        <SelectField label="In" error={errors.teamId?.message} {...form.register('teamId')}>
          <option value="">all my teams</option>
          {props.memberships.map(({ teamId, teamName }) => (
            <option key={teamId} value={teamId}>
              {teamName}
            </option>
          ))}
        </SelectField>
        <SelectField label="It ends" error={errors.end?.message} {...form.register('end')}>
          {tokenEnds.map(({ key, label }) => (
            <option key={key} value={key}>
              {label}
            </option>
          ))}
        </SelectField>
        {end === 'date' && (
          <TextField
            type="date"
            label="Last day"
            min={days.first}
            max={days.last}
            error={errors.day?.message}
            {...form.register('day')}
          />
        )}
      </div>
      {problem !== undefined && <Notice kind="problem">{problem}</Notice>}
      <div className="flex flex-wrap gap-2.5">
        <Button type="submit" busy={isSubmitting} busyLabel="Making it">
          Make the token
        </Button>
        <Button onClick={props.onCancel}>Cancel</Button>
      </div>
    </form>
  );
}
