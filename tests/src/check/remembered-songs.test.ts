import { beforeEach, describe, expect, it } from 'vitest';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { forgetSong, recallSong, rememberSong } from '../../../src/check/remembered-songs.ts';

const said = { ...emptySessionInformation(), artist: 'Velvet Tramline', title: 'Paper Ferry' };

describe('what was said about a song', () => {
  beforeEach(() => localStorage.clear());

  it('is there the next time its folder is dropped, and gone when it is forgotten', () => {
    rememberSong('Paper Ferry export', said);
    expect(recallSong('Paper Ferry export')).toEqual(said);
    expect(recallSong('Another')).toBeNull();
    forgetSong('Paper Ferry export');
    expect(recallSong('Paper Ferry export')).toBeNull();
    expect(localStorage.getItem('flightcase.songs')).not.toContain('Velvet');
  });

  it('is kept once a folder, the latest', () => {
    rememberSong('Export', said);
    rememberSong('Export', { ...said, title: 'Night Bus North' });
    expect(recallSong('Export')?.title).toBe('Night Bus North');
    expect(JSON.parse(localStorage.getItem('flightcase.songs')!)).toHaveLength(1);
  });

  it('makes room for new songs by the oldest', () => {
    for (let index = 0; index < 41; index++) rememberSong(`Song ${String(index)}`, said);
    expect(recallSong('Song 0')).toBeNull();
    expect(recallSong('Song 1')).toEqual(said);
  });

  it('is not asked of loose files, which have no folder', () => {
    rememberSong(null, said);
    expect(recallSong(null)).toBeNull();
  });

  it.each(['no JSON', '{}', '[null, 3, {"folderName": "Export", "information": {"artist": 7}}]'])(
    'survives a storage that holds %s',
    (stored) => {
      localStorage.setItem('flightcase.songs', stored);
      expect(recallSong('Export')).toBeNull();
      rememberSong('Export', said);
      expect(recallSong('Export')).toEqual(said);
    },
  );
});
