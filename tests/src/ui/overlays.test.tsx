import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { Button } from '../../../src/ui/button.tsx';
import { AlertDialog, Dialog } from '../../../src/ui/dialog.tsx';
import { Menu, MenuItem } from '../../../src/ui/menu.tsx';
import { Tabs } from '../../../src/ui/tabs.tsx';

function DialogSample() {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button
        onClick={() => {
          setOpen(true);
        }}
      >
        Rename
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title="Rename this file" description="In the zip.">
        <input aria-label="Name" />
      </Dialog>
    </>
  );
}

describe('Dialog', () => {
  it('is named and described, closes by Escape and gives the focus back', async () => {
    render(<DialogSample />);
    const user = userEvent.setup();
    await user.click(screen.getByRole('button', { name: 'Rename' }));
    const dialog = screen.getByRole('dialog', { name: 'Rename this file' });
    expect(dialog).toHaveAccessibleDescription('In the zip.');
    expect(dialog).toContainElement(document.activeElement as HTMLElement);
    await user.keyboard('{Escape}');
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(screen.getByRole('button', { name: 'Rename' })).toHaveFocus();
  });
});

describe('AlertDialog', () => {
  it('starts on the harmless answer', async () => {
    const confirm = vi.fn();
    const change = vi.fn();
    render(
      <AlertDialog
        open
        onOpenChange={change}
        title="Leave it out?"
        description="It will not be in the zip."
        confirmWords="Leave it out"
        onConfirm={confirm}
      />,
    );
    const user = userEvent.setup();
    expect(screen.getByRole('button', { name: 'Keep it as it is' })).toHaveFocus();
    await user.keyboard('{Enter}');
    expect(change).toHaveBeenCalledWith(false);
    expect(confirm).not.toHaveBeenCalled();
    await user.click(screen.getByRole('button', { name: 'Leave it out' }));
    expect(confirm).toHaveBeenCalledTimes(1);
  });
});

describe('Menu', () => {
  it('opens and acts by keyboard, skipping what cannot be done', async () => {
    const copy = vi.fn();
    const listen = vi.fn();
    render(
      <Menu trigger={<Button>More</Button>}>
        <MenuItem disabled onSelect={listen}>
          Listen
        </MenuItem>
        <MenuItem onSelect={copy}>Copy the name</MenuItem>
      </Menu>,
    );
    const user = userEvent.setup();
    await user.tab();
    await user.keyboard('{Enter}');
    expect(await screen.findByRole('menuitem', { name: 'Copy the name' })).toHaveFocus();
    await user.keyboard('{Enter}');
    expect(copy).toHaveBeenCalledTimes(1);
    expect(listen).not.toHaveBeenCalled();
  });
});

function TabsSample() {
  const [value, setValue] = useState<'fix' | 'know'>('fix');
  return (
    <Tabs
      label="Findings"
      value={value}
      onChange={setValue}
      tabs={[
        { value: 'fix', label: 'We can fix', count: 4, content: 'Four repairs.' },
        { value: 'know', label: 'Know', content: 'Nothing to do.' },
      ]}
    />
  );
}

describe('Tabs', () => {
  it('moves by arrow keys', async () => {
    render(<TabsSample />);
    const user = userEvent.setup();
    await user.tab();
    expect(screen.getByRole('tab', { name: 'We can fix 4' })).toHaveFocus();
    await user.keyboard('{ArrowRight}');
    expect(screen.getByRole('tabpanel', { name: 'Know' })).toHaveTextContent('Nothing to do.');
  });
});
