import { expect, it } from 'vitest';
import { nameSession } from '#shared/naming/name-session.ts';
import { numbered } from './naming-cases.ts';

const information = {
  artist: 'Velvet Tramline',
  title: 'Night Bus North',
  names: { 'take me.wav': '07 Hand Made' },
  roles: { 'Ref.wav': 'track' as const, 'kik.wav': 'leave-out' as const },
};

it('reads and names a session in one go; what is said by hand wins', () => {
  const paths = [
    'Ref.wav',
    'kik.wav',
    'take me.wav',
    'NightBusNorth_BV_01.wav',
    'Night Bus North.wav',
    'snr.wav',
  ];
  const named = nameSession(
    paths.map((path) => ({ path, channels: 1 })),
    numbered,
    information,
  );
  expect(named.map(({ path, role, proposedName }) => [path, role, proposedName])).toEqual([
    ['Ref.wav', 'track', null],
    ['kik.wav', 'leave-out', null],
    ['take me.wav', 'track', '07 Hand Made'],
    ['NightBusNorth_BV_01.wav', 'track', '02 Backing Vocal'],
    ['Night Bus North.wav', 'rough-mix', null],
    ['snr.wav', 'track', '01 Snare'],
  ]);
  expect(named[3]?.parsed).toMatchObject({ groupId: 'vocals', counter: 1, confidence: 'certain' });
});
