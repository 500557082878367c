import { useId } from 'react';
import { chooseTheme, useThemeChoice, type ThemeChoice } from './theme.ts';

const choices: { value: ThemeChoice; label: string }[] = [
  { value: 'system', label: 'As my device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
];

/** Light or dark, as three native radio buttons in one line. */
export function ThemeSwitch() {
  const choice = useThemeChoice();
  const name = useId();
  return (
    <fieldset className="inline-flex flex-wrap rounded border border-edge bg-sheet p-0.5">
      <legend className="sr-only">Colours</legend>
      {choices.map((option) => (
        <label
          key={option.value}
          className="relative rounded-slight px-3 py-1 text-small text-ink-2 hover:text-ink has-checked:bg-case has-checked:text-on-case has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-case"
        >
          <input
            type="radio"
            name={name}
            checked={option.value === choice}
            onChange={() => {
              chooseTheme(option.value);
            }}
            className="absolute inset-0 appearance-none opacity-0"
          />
          {option.label}
        </label>
      ))}
    </fieldset>
  );
}
