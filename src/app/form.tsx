import { AppError } from '#shared/errors.ts';
import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactNode } from 'react';
import {
  useForm,
  type DefaultValues,
  type FieldErrors,
  type FieldValues,
  type Path,
  type Resolver,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { Button, type ButtonKind } from '../ui/button.tsx';
import { ErrorPanel } from './error-panel.tsx';
import { errorText } from './error-text.ts';
import type { FieldWords } from './field-words.ts';

type BodyFormOptions<Input extends FieldValues, Output> = {
  /** The contract's schema of the body: the server checks by the same. */
  schema: z.ZodType<Output, Input>;
  defaults: DefaultValues<Input>;
  /** Plain words for the mistakes of each field. */
  words: Record<Path<Input>, FieldWords>;
  /** Sends it. An AppError it throws is shown; it may name the field it belongs to. */
  submit: (values: Output) => Promise<void>;
  /** The field a server's refusal belongs to, with words for it; otherwise the form says it. */
  refusedField?: (error: AppError) => { field: Path<Input>; words: string } | undefined;
};

export type BodyForm<Input extends FieldValues, Output> = UseFormReturn<Input, unknown, Output> & {
  /** For the form element. */
  send: (event: React.FormEvent) => void;
  busy: boolean;
  failure: unknown;
  /** The words under a field, where something is wrong with it. */
  mistake: (field: Path<Input>) => string | undefined;
};

/** zod's resolver with our words in place of its technical ones. Fields are flat. */
function resolverInWords<Input extends FieldValues, Output>(
  schema: z.ZodType<Output, Input>,
  words: Record<Path<Input>, FieldWords>,
): Resolver<Input, unknown, Output> {
  const resolve = zodResolver<Input, unknown, Output>(schema);
  return async (values, context, options) => {
    const result = await resolve(values, context, options);
    const errors = Object.fromEntries(
      Object.entries(result.errors).map(([field, error]) => {
        const kind = typeof error?.type === 'string' ? error.type : '';
        return [field, { ...error, message: words[field as Path<Input>](kind) }];
      }),
    );
    if (Object.keys(errors).length === 0) return result;
    return { values: {}, errors: errors as FieldErrors<Input> };
  };
}

/** A form over the body of an endpoint: its values, its mistakes, its sending. */
export function useBodyForm<Input extends FieldValues, Output>({
  schema,
  defaults,
  words,
  submit,
  refusedField,
}: BodyFormOptions<Input, Output>): BodyForm<Input, Output> {
  const [failure, setFailure] = useState<unknown>();
  const form = useForm<Input, unknown, Output>({
    resolver: resolverInWords(schema, words),
    defaultValues: defaults,
  });
  const send = form.handleSubmit(async (values) => {
    setFailure(undefined);
    try {
      await submit(values);
    } catch (error) {
      const refused = error instanceof AppError ? refusedField?.(error) : undefined;
      if (refused === undefined) setFailure(error);
      else form.setError(refused.field, { message: refused.words }, { shouldFocus: true });
    }
  });
  return Object.assign(form, {
    send: (event: React.FormEvent) => {
      if (form.formState.isSubmitting) event.preventDefault();
      else void send(event);
    },
    busy: form.formState.isSubmitting,
    failure,
    mistake: (field: Path<Input>) => form.getFieldState(field, form.formState).error?.message,
  });
}

/** A refusal that belongs to the password field: the current password was wrong. */
export function wrongPassword<Field extends string>(field: Field) {
  return (error: AppError) =>
    error.code === 'sign-in-failed' ? { field, words: 'This is not your password.' } : undefined;
}

/** A refusal that belongs to a field because its value is in use. */
export function alreadyTaken<Field extends string>(field: Field) {
  return (error: AppError) =>
    error.code === 'already-taken' ? { field, words: errorText(error).title } : undefined;
}

type FormProps = {
  form: { send: (event: React.FormEvent) => void; busy: boolean; failure: unknown };
  /** What the button does, in words. */
  submitWords: string;
  busyWords?: string;
  submitKind?: ButtonKind;
  /** Beside the button: another way. */
  aside?: ReactNode;
  /** For a single field: the button stands beside it where there is room. */
  inLine?: boolean;
  children?: ReactNode;
};

/** The form element: fields, what went wrong with the whole, and one button. */
export function Form({
  form,
  submitWords,
  busyWords = 'One moment…',
  submitKind = 'primary',
  aside,
  inLine = false,
  children,
}: FormProps) {
  const failure = form.failure !== undefined && <ErrorPanel error={form.failure} />;
  const button = (
    <Button type="submit" kind={submitKind} busy={form.busy} busyWords={busyWords}>
      {submitWords}
    </Button>
  );
  if (inLine)
    return (
      <form noValidate onSubmit={form.send} className="flex flex-col gap-4">
        <div className="flex flex-col items-start gap-3 sm:flex-row">
          <div className="w-full min-w-0 sm:grow">{children}</div>
          {/* Level with the control, whose label is one line above it. */}
          <div className="shrink-0 sm:pt-7">{button}</div>
        </div>
        {failure}
      </form>
    );
  return (
    <form noValidate onSubmit={form.send} className="flex flex-col gap-5">
      {children}
      {failure}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-3">
        {button}
        {aside}
      </div>
    </form>
  );
}
