import { Select as Parts } from 'radix-ui';
import { controlClass } from './text-input.tsx';
import type { FieldControlProps } from './field.tsx';

export type SelectOption<Value extends string> = {
  value: Value;
  label: string;
  /** A quieter second line. */
  hint?: string;
  disabled?: boolean;
};

type SelectProps<Value extends string> = Partial<FieldControlProps> & {
  options: readonly SelectOption<Value>[];
  value: Value | undefined;
  onChange: (value: Value) => void;
  placeholder?: string;
  /** Needed where no Field labels the control. */
  'aria-label'?: string;
  size?: 'medium' | 'small';
  disabled?: boolean;
};

/** Choosing one of a few; for yes or no use Checkbox, for two or three use RadioGroup. */
export function Select<Value extends string>({
  options,
  value,
  onChange,
  placeholder = 'Choose…',
  size = 'medium',
  disabled = false,
  ...control
}: SelectProps<Value>) {
  return (
    <Parts.Root
      {...(value === undefined ? {} : { value })}
      onValueChange={(chosen) => {
        onChange(chosen as Value);
      }}
      disabled={disabled}
    >
      <Parts.Trigger
        {...control}
        className={`${controlClass} flex items-center justify-between gap-3 text-left data-placeholder:text-ink-2 ${size === 'small' ? 'py-1 text-small' : ''}`}
      >
        <span className="truncate">
          <Parts.Value placeholder={placeholder} />
        </span>
        <Parts.Icon asChild>
          <svg viewBox="0 0 16 16" width="14" height="14" aria-hidden="true" className="shrink-0">
            <path d="m3 6 5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.75" />
          </svg>
        </Parts.Icon>
      </Parts.Trigger>
      <Parts.Portal>
        <Parts.Content
          position="popper"
          sideOffset={4}
          className="overlay-flyout max-h-(--radix-select-content-available-height) min-w-(--radix-select-trigger-width) overflow-hidden"
        >
          <Parts.Viewport className="p-1">
            {options.map((option) => (
              <Parts.Item
                key={option.value}
                value={option.value}
                disabled={option.disabled ?? false}
                className="overlay-item pr-9"
              >
                <span>
                  <Parts.ItemText>{option.label}</Parts.ItemText>
                  {option.hint !== undefined && (
                    <span className="block text-small text-ink-2">{option.hint}</span>
                  )}
                </span>
                <Parts.ItemIndicator className="absolute right-3 text-case">
                  <svg viewBox="0 0 16 16" width="14" height="14" aria-hidden="true">
                    <path
                      d="M3 8.5 6.5 12 13 4.5"
                      fill="none"
                      stroke="currentColor"
                      strokeWidth="2"
                    />
                  </svg>
                </Parts.ItemIndicator>
              </Parts.Item>
            ))}
          </Parts.Viewport>
        </Parts.Content>
      </Parts.Portal>
    </Parts.Root>
  );
}
