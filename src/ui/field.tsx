import { useId, type ReactNode } from 'react';
import { LevelIcon } from './level-mark.tsx';

/** What a control must carry so that its label, hint and error belong to it. */
export type FieldControlProps = {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
};

type FieldProps = {
  label: ReactNode;
  /** Said before a mistake is made, such as what a password needs. */
  hint?: ReactNode;
  /** What is wrong, in words; announced when it appears. */
  error?: string | undefined;
  /** Marked in words; required is the normal case and carries no mark. */
  optional?: boolean;
  children: (control: FieldControlProps) => ReactNode;
  className?: string;
};

/** Label, control, hint and error of one field, tied together for screen readers. */
export function Field({ label, hint, error, optional, children, className = '' }: FieldProps) {
  const id = useId();
  const hintId = `${id}-hint`;
  const errorId = `${id}-error`;
  const describedBy = [error === undefined ? '' : errorId, hint === undefined ? '' : hintId]
    .filter((part) => part !== '')
    .join(' ');
  return (
    <div className={`flex flex-col gap-1.5 ${className}`}>
      <label htmlFor={id} className="text-small font-medium text-ink">
        {label}
        {optional === true && <span className="font-normal text-ink-2"> (optional)</span>}
      </label>
      {hint !== undefined && (
        <p id={hintId} className="-mt-1 text-small text-ink-2">
          {hint}
        </p>
      )}
      {children({
        id,
        'aria-describedby': describedBy === '' ? undefined : describedBy,
        'aria-invalid': error === undefined ? undefined : true,
      })}
      <FieldError id={errorId} error={error} />
    </div>
  );
}

/** The live region stays in the page, so that a screen reader hears the words arrive. */
export function FieldError({ id, error }: { id: string; error: string | undefined }) {
  return (
    <div aria-live="polite">
      {error !== undefined && (
        <p id={id} className="flex gap-2 text-small font-medium text-must">
          <LevelIcon level="must-fix" className="mt-[0.1875rem]" />
          <span>{error}</span>
        </p>
      )}
    </div>
  );
}
