import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { readFile } from 'node:fs/promises';
import { runInThisContext } from 'node:vm';
import { describe, expect, it, vi } from 'vitest';
import { ThemeSwitch } from '../../../src/ui/theme-switch.tsx';
import { chooseTheme, onThemeChange, themeStorageKey } from '../../../src/ui/theme.ts';

const blockingScript = await readFile('src/public/theme.js', 'utf8');

function runBlockingScript(): void {
  // In the page's own global scope, as the browser would.
  runInThisContext(blockingScript);
}

describe('the chosen theme', () => {
  it('is set before the page paints, from the same key', () => {
    chooseTheme('dark');
    delete document.documentElement.dataset['theme'];
    runBlockingScript();
    expect(document.documentElement.dataset['theme']).toBe('dark');
  });

  it('leaves everything to the device when nothing or nonsense was chosen', () => {
    runBlockingScript();
    expect(document.documentElement.dataset['theme']).toBeUndefined();
    localStorage.setItem(themeStorageKey, 'purple');
    runBlockingScript();
    expect(document.documentElement.dataset['theme']).toBeUndefined();
  });

  it('is forgotten when the device decides again', () => {
    chooseTheme('light');
    chooseTheme('system');
    expect(localStorage.getItem(themeStorageKey)).toBeNull();
    expect(document.documentElement.dataset['theme']).toBeUndefined();
  });

  it('holds for the page where storage is forbidden', () => {
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new Error('forbidden');
    });
    chooseTheme('dark');
    expect(document.documentElement.dataset['theme']).toBe('dark');
    vi.restoreAllMocks();
  });

  it('is told to pictures that must be drawn again', () => {
    const redraw = vi.fn();
    const stop = onThemeChange(redraw);
    chooseTheme('dark');
    expect(redraw).toHaveBeenCalledTimes(1);
    stop();
    chooseTheme('light');
    expect(redraw).toHaveBeenCalledTimes(1);
  });
});

describe('ThemeSwitch', () => {
  it('shows the choice and changes it by mouse and by arrow keys', async () => {
    render(<ThemeSwitch />);
    const user = userEvent.setup();
    expect(screen.getByRole('radio', { name: 'As my device' })).toBeChecked();
    await user.click(screen.getByRole('radio', { name: 'Dark' }));
    expect(document.documentElement.dataset['theme']).toBe('dark');
    await user.keyboard('{ArrowLeft}');
    expect(document.documentElement.dataset['theme']).toBe('light');
  });

  it('follows a choice made elsewhere on the page', () => {
    render(<ThemeSwitch />);
    act(() => {
      chooseTheme('dark');
    });
    expect(screen.getByRole('radio', { name: 'Dark' })).toBeChecked();
  });
});
