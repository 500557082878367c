import { useState, type ComponentProps } from 'react';

/** The box of every control one types or chooses in. */
export const controlClass =
  'w-full rounded border border-edge bg-sheet px-3 py-2 text-body leading-6 text-ink placeholder:text-ink-2 hover:border-ink disabled:opacity-60 aria-invalid:border-must aria-invalid:shadow-[inset_3px_0_0_var(--must)]';

export function TextInput({ className = '', ...rest }: ComponentProps<'input'>) {
  return <input type="text" {...rest} className={`${controlClass} ${className}`} />;
}

export function TextArea({ className = '', ...rest }: ComponentProps<'textarea'>) {
  return <textarea rows={4} {...rest} className={`${controlClass} resize-y ${className}`} />;
}

/** A password that can be looked at and pasted, so that long ones are no hardship. */
export function PasswordInput({ className = '', ...rest }: Omit<ComponentProps<'input'>, 'type'>) {
  const [shown, setShown] = useState(false);
  return (
    <div className={`relative ${className}`}>
      <input
        autoCapitalize="none"
        spellCheck={false}
        {...rest}
        type={shown ? 'text' : 'password'}
        className={`${controlClass} pr-18`}
      />
      <button
        type="button"
        aria-pressed={shown}
        aria-controls={rest.id}
        aria-label={shown ? 'Hide password' : 'Show password'}
        onClick={() => {
          setShown(!shown);
        }}
        className="absolute inset-y-1 right-1 rounded-slight px-3 text-small font-medium text-case hover:bg-wash"
      >
        {shown ? 'Hide' : 'Show'}
      </button>
    </div>
  );
}
