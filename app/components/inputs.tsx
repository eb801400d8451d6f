import type { InputHTMLAttributes, Ref, SelectHTMLAttributes, TextareaHTMLAttributes } from 'react';
import { classNames } from '#app/lib/class-names.ts';
import { Field, fieldInput, type FieldProps } from './field.tsx';

/** Takes the field's own words out of the props that go to the input. */
function split<Props extends FieldProps>({ label, unit, hint, error, className, ...input }: Props) {
  return { field: { label, unit, hint, error, className }, input };
}

export type TextFieldProps = FieldProps &
  Omit<InputHTMLAttributes<HTMLInputElement>, 'className' | 'type'> & {
    type?: 'text' | 'email' | 'password' | 'date';
    ref?: Ref<HTMLInputElement>;
  };

/** A line of text, an e-mail address, a password or a day. Spreads what `register` of react-hook-form gives. */
export function TextField(props: TextFieldProps) {
  const { field, input } = split(props);
  return (
    <Field {...field}>
      {(wiring) => (
        <input type="text" className={classNames(fieldInput, 'text-[15px]')} {...input} {...wiring} />
      )}
    </Field>
  );
}

export type NumberFieldProps = FieldProps &
  Omit<InputHTMLAttributes<HTMLInputElement>, 'className' | 'type'> & { ref?: Ref<HTMLInputElement> };

/** A number with its unit. A text input, so that a wheel over it changes nothing and a comma is seen, not swallowed. */
export function NumberField(props: NumberFieldProps) {
  const { field, input } = split(props);
  return (
    <Field {...field}>
      {(wiring) => (
        <input
          type="text"
          inputMode="decimal"
          autoComplete="off"
          className={classNames(fieldInput, 'font-mono font-medium')}
          {...input}
          {...wiring}
        />
      )}
    </Field>
  );
}

export type SelectFieldProps = FieldProps &
  Omit<SelectHTMLAttributes<HTMLSelectElement>, 'className'> & { ref?: Ref<HTMLSelectElement> };

/** One of a few; the options are its children. */
export function SelectField(props: SelectFieldProps) {
  const { field, input } = split(props);
  return (
    <Field {...field}>
      {(wiring) => <select className={classNames(fieldInput, 'cursor-pointer')} {...input} {...wiring} />}
    </Field>
  );
}

export type TextAreaFieldProps = FieldProps &
  Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'className'> & { ref?: Ref<HTMLTextAreaElement> };

/** Several lines of text. */
export function TextAreaField(props: TextAreaFieldProps) {
  const { field, input } = split(props);
  return (
    <Field {...field}>
      {(wiring) => (
        <textarea
          rows={4}
          className={classNames(fieldInput, 'h-auto py-2 leading-snug')}
          {...input}
          {...wiring}
        />
      )}
    </Field>
  );
}
