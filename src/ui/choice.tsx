import { useId, type ComponentProps, type ReactNode } from 'react';
import { FieldError } from './field.tsx';

const markClass =
  'peer col-start-1 row-start-1 size-5 shrink-0 appearance-none border border-edge bg-sheet checked:border-case checked:bg-case hover:border-ink disabled:opacity-60 aria-invalid:border-must';

type CheckboxProps = Omit<ComponentProps<'input'>, 'type'> & {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
};

/** A native checkbox in our looks; the whole line is its target. */
export function Checkbox({ label, hint, error, className = '', ...rest }: CheckboxProps) {
  const errorId = useId();
  return (
    <div className={className}>
      <label className="grid min-h-8 grid-cols-[1.25rem_1fr] items-start gap-x-3 py-1">
        <input
          {...rest}
          type="checkbox"
          aria-invalid={error === undefined ? undefined : true}
          aria-describedby={error === undefined ? undefined : errorId}
          className={`${markClass} mt-0.5 rounded-slight`}
        />
        <svg
          viewBox="0 0 16 16"
          aria-hidden="true"
          className="pointer-events-none invisible col-start-1 row-start-1 mt-1 size-4 justify-self-center text-on-case peer-checked:visible"
        >
          <path d="M3 8.5 6.5 12 13 4.5" fill="none" stroke="currentColor" strokeWidth="2.25" />
        </svg>
        <span className="col-start-2 row-start-1">
          {label}
          {hint !== undefined && <span className="block text-small text-ink-2">{hint}</span>}
        </span>
      </label>
      <FieldError id={errorId} error={error} />
    </div>
  );
}

type RadioOption<Value extends string> = { value: Value; label: ReactNode; hint?: ReactNode };

type RadioGroupProps<Value extends string> = {
  legend: string;
  /** The options in order; the first is nothing special. */
  options: readonly RadioOption<Value>[];
  value: Value;
  onChange: (value: Value) => void;
  /** Show the legend only to screen readers, where a heading already says it. */
  legendHidden?: boolean;
  className?: string;
};

/** Native radio buttons: arrow keys move, one Tab stop. */
export function RadioGroup<Value extends string>({
  legend,
  options,
  value,
  onChange,
  legendHidden = false,
  className = '',
}: RadioGroupProps<Value>) {
  const name = useId();
  return (
    <fieldset className={className}>
      <legend className={legendHidden ? 'sr-only' : 'mb-1 text-small font-medium'}>{legend}</legend>
      {options.map((option) => (
        <label
          key={option.value}
          className="grid min-h-8 grid-cols-[1.25rem_1fr] items-start gap-x-3 py-1"
        >
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={option.value === value}
            onChange={() => {
              onChange(option.value);
            }}
            className={`${markClass} mt-0.5 rounded-full`}
          />
          <span
            aria-hidden="true"
            className="pointer-events-none invisible col-start-1 row-start-1 mt-[0.4375rem] size-2.5 justify-self-center rounded-full bg-on-case peer-checked:visible"
          />
          <span className="col-start-2 row-start-1">
            {option.label}
            {option.hint !== undefined && (
              <span className="block text-small text-ink-2">{option.hint}</span>
            )}
          </span>
        </label>
      ))}
    </fieldset>
  );
}
