import { describe, expect, it } from 'vitest';
import { tellsPersonalBytes, withoutPersonalText } from '#shared/wave/personal-text.ts';

describe('paths and addresses in metadata', () => {
  it.each([
    ['/Users/juno/My Songs/kick.wav', 'kick.wav'],
    ['taken from C:\\Users\\juno\\Kick.wav', 'taken from Kick.wav'],
    ['D:\\x.wav', 'x.wav'],
    ['C:/a/b.wav', 'b.wav'],
    ['C:\\Users\\juno', ''],
    ['/home/juno/', ''],
    ['/srv/takes/take 3.wav', 'take 3.wav'],
    ['file:///home/juno/k.wav', 'k.wav'],
    ['\\\\studio-nas\\share\\x.wav', 'x.wav'],
    ['write to juno.park@velvet-tramline.example!', 'write to !'],
  ])('%j becomes %j', (text, cleaned) => {
    expect(withoutPersonalText(text)).toBe(cleaned);
  });

  it.each([
    'A=PCM,F=48000,W=24,M=mono,T=deck/1',
    'and/or 48k/24bit, ratio 4:1',
    '12/01/2026 10:15',
    'Verse /Chorus/ Bridge',
    'Salt on the Windows (112 BPM)',
    'L/R, M/S: both',
  ])('%j stays as it is', (text) => {
    expect(withoutPersonalText(text)).toBe(text);
    expect(tellsPersonalBytes(Buffer.from(text))).toBe(false);
  });

  it('are found between other bytes, in text of 16 bits and across the borders of a search', () => {
    const path = '/Volumes/Takes/kick.wav';
    for (const encoding of ['latin1', 'utf16le'] as const) {
      for (const place of [0, 100, 65_530, 65_536, 131_060]) {
        const bytes = Buffer.alloc(200_000, 0x81);
        bytes.write(path, place, encoding);
        expect(tellsPersonalBytes(bytes)).toBe(true);
      }
    }
  });

  it('are not found by chance in a megabyte of noise', () => {
    let state = 1;
    const noise = Uint8Array.from({ length: 1 << 20 }, () => {
      state = (Math.imul(state, 1664525) + 1013904223) | 0;
      return state >>> 24;
    });
    expect(tellsPersonalBytes(noise)).toBe(false);
  });
});
