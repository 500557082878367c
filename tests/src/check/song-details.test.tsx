import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { expect, it, vi } from 'vitest';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import { SongDetails } from '../../../src/check/song-details.tsx';

function renderDetails(start: Partial<SessionInformation> = {}) {
  let latest: SessionInformation = { ...emptySessionInformation(), ...start };
  const onForget = vi.fn();
  function Held() {
    const [information, setInformation] = useState(latest);
    latest = information;
    return (
      <SongDetails
        information={information}
        rules={defaultRules}
        tracks={['Bass.wav', 'Lead Vocal.wav']}
        onChange={(change) => setInformation({ ...information, ...change })}
        onForget={onForget}
      />
    );
  }
  render(<Held />);
  return { said: () => latest, onForget, user: userEvent.setup() };
}

it('takes a tempo that changes from the one that was given, and "no click" as a full answer', async () => {
  const { said, user } = renderDetails({ tempo: { kind: 'fixed', bpm: 96 } });
  await user.click(screen.getByRole('radio', { name: 'It changes' }));
  await user.click(screen.getByRole('button', { name: 'Add a change' }));
  expect(said().tempo).toEqual({
    kind: 'changes',
    changes: [
      { bar: 1, bpm: 96 },
      { bar: 9, bpm: 96 },
    ],
  });
  await user.click(screen.getByRole('button', { name: 'Remove' }));
  expect(said().tempo).toEqual({ kind: 'changes', changes: [{ bar: 1, bpm: 96 }] });
  await user.click(screen.getByRole('radio', { name: 'Played without a click' }));
  expect(said().tempo).toEqual({ kind: 'no-click' });
});

it('keeps the last whole bar number while another is typed', async () => {
  const { said, user } = renderDetails();
  const bar = screen.getByLabelText('Files begin at bar');
  await user.clear(bar);
  expect(said().startBar).toBe(1);
  await user.type(bar, '-3');
  expect(said().startBar).toBe(-3);
});

it('orders parts by buttons and forgets those that are no longer there', async () => {
  const { said, user } = renderDetails({
    orderOfImportance: ['Gone.wav', 'Bass.wav', 'Lead Vocal.wav'],
  });
  await user.click(screen.getByRole('button', { name: 'Lead Vocal: more important' }));
  expect(said().orderOfImportance).toEqual(['Lead Vocal.wav', 'Bass.wav']);
  expect(screen.getByRole('button', { name: 'Lead Vocal: more important' })).toBeDisabled();
  for (const name of ['Bass', 'Lead Vocal']) {
    await user.click(screen.getByRole('button', { name: `${name}: take off the list` }));
  }
  expect(said().orderOfImportance).toBeNull();
});

it('forgets the song on a press', async () => {
  const { onForget, user } = renderDetails();
  await user.click(screen.getByRole('button', { name: 'Forget this song' }));
  expect(onForget).toHaveBeenCalledOnce();
});
