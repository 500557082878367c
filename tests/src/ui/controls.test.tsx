import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { Button } from '../../../src/ui/button.tsx';
import { Checkbox, RadioGroup } from '../../../src/ui/choice.tsx';
import { Field } from '../../../src/ui/field.tsx';
import { Progress } from '../../../src/ui/progress.tsx';
import { Select } from '../../../src/ui/select.tsx';
import { PasswordInput, TextInput } from '../../../src/ui/text-input.tsx';

describe('Button', () => {
  it('keeps its focus and does nothing while busy', async () => {
    const press = vi.fn();
    render(
      <Button busy busyWords="Saving…" onClick={press}>
        Save the zip
      </Button>,
    );
    const user = userEvent.setup();
    const button = screen.getByRole('button', { name: 'Saving…' });
    await user.tab();
    expect(button).toHaveFocus();
    await user.click(button);
    await user.keyboard('{Enter}');
    expect(press).not.toHaveBeenCalled();
    expect(button).toHaveAttribute('aria-busy', 'true');
  });

  it('does not send a form while busy', async () => {
    const send = vi.fn((event: React.FormEvent) => {
      event.preventDefault();
    });
    render(
      <form onSubmit={send}>
        <Button type="submit" busy>
          Send
        </Button>
      </form>,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Send' }));
    expect(send).not.toHaveBeenCalled();
  });
});

describe('Field', () => {
  it('ties label, hint and error to the control', () => {
    const { rerender } = render(
      <Field label="Tempo" hint="Beats in a minute.">
        {(control) => <TextInput {...control} />}
      </Field>,
    );
    const input = screen.getByLabelText('Tempo');
    expect(input).toHaveAccessibleDescription('Beats in a minute.');
    expect(input).not.toBeInvalid();
    rerender(
      <Field label="Tempo" hint="Beats in a minute." error="Write a number.">
        {(control) => <TextInput {...control} />}
      </Field>,
    );
    expect(input).toBeInvalid();
    expect(input).toHaveAccessibleDescription('Write a number. Beats in a minute.');
    expect(screen.getByText('Write a number.').closest('[aria-live]')).not.toBeNull();
  });
});

describe('PasswordInput', () => {
  it('can be shown, hidden and pasted into', async () => {
    render(<Field label="Password">{(control) => <PasswordInput {...control} />}</Field>);
    const user = userEvent.setup();
    const input = screen.getByLabelText('Password');
    expect(input).toHaveAttribute('type', 'password');
    await user.click(input);
    await user.paste('a long sentence from a password manager');
    expect(input).toHaveValue('a long sentence from a password manager');
    await user.click(screen.getByRole('button', { name: 'Show password' }));
    expect(input).toHaveAttribute('type', 'text');
    await user.click(screen.getByRole('button', { name: 'Hide password' }));
    expect(input).toHaveAttribute('type', 'password');
  });
});

describe('Checkbox', () => {
  it('is ticked by its words and says what is wrong', async () => {
    render(<Checkbox label="The arrangement is final." error="Tick this." />);
    await userEvent.click(screen.getByText('The arrangement is final.'));
    const box = screen.getByRole('checkbox', { name: 'The arrangement is final.' });
    expect(box).toBeChecked();
    expect(box).toHaveAccessibleDescription('Tick this.');
  });
});

function Guitars({ onChange }: { onChange: (value: string) => void }) {
  const [value, setValue] = useState<'dry' | 'wet'>('dry');
  return (
    <RadioGroup
      legend="Send the guitars"
      value={value}
      onChange={(chosen) => {
        setValue(chosen);
        onChange(chosen);
      }}
      options={[
        { value: 'dry', label: 'clean' },
        { value: 'wet', label: 'with the amp' },
      ]}
    />
  );
}

describe('RadioGroup', () => {
  it('is one stop for Tab and moves by arrow keys', async () => {
    const onChange = vi.fn();
    render(<Guitars onChange={onChange} />);
    const user = userEvent.setup();
    await user.tab();
    expect(screen.getByRole('radio', { name: 'clean' })).toHaveFocus();
    await user.keyboard('{ArrowDown}');
    expect(onChange).toHaveBeenCalledWith('wet');
    expect(screen.getByRole('group', { name: 'Send the guitars' })).toBeInTheDocument();
  });
});

describe('Select', () => {
  it('opens, moves and chooses by keyboard', async () => {
    const onChange = vi.fn();
    render(
      <Select
        aria-label="Sample rate"
        value={undefined}
        onChange={onChange}
        options={[
          { value: '44100', label: '44.1 kHz' },
          { value: '48000', label: '48 kHz' },
        ]}
      />,
    );
    const user = userEvent.setup();
    screen.getByRole('combobox', { name: 'Sample rate' }).focus();
    await user.keyboard('{Enter}');
    await screen.findByRole('option', { name: '44.1 kHz' });
    await user.keyboard('{ArrowDown}{Enter}');
    expect(onChange).toHaveBeenCalledWith('48000');
  });
});

describe('Progress', () => {
  it('tells how far the work is, within 0 and 100', () => {
    const { rerender } = render(<Progress label="Reading" value={0.355} />);
    const bar = screen.getByRole('progressbar', { name: 'Reading' });
    expect(bar).toHaveAttribute('aria-valuenow', '36');
    rerender(<Progress label="Reading" value={1.2} />);
    expect(bar).toHaveAttribute('aria-valuenow', '100');
    rerender(<Progress label="Reading" value={undefined} />);
    expect(bar).not.toHaveAttribute('aria-valuenow');
  });
});
