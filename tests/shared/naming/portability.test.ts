import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkPortability, makePortable } from '#shared/naming/portability.ts';

function codesOf(name: string): string[] {
  return checkPortability(name).map(({ code }) => code);
}

describe('checkPortability', () => {
  // Microsoft, "Naming Files, Paths, and Namespaces": reserved characters.
  it.each(['<', '>', ':', '"', '/', '\\', '|', '?', '*'])(
    'refuses %s, as Windows does',
    (character) => {
      expect(checkPortability(`a${character}b.wav`)).toEqual([
        { code: 'forbidden-characters', found: [character] },
      ]);
    },
  );

  // Same source: NUL and the characters 1 to 31.
  it('refuses every control character', () => {
    for (let code = 0; code < 32; code++) {
      expect(codesOf(`a${String.fromCharCode(code)}b`)).toContain('control-characters');
    }
  });

  // Same source: device names, with and without extension, in any case.
  it('refuses every device name', () => {
    const numbers = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '¹', '²', '³'];
    const devices = ['CON', 'PRN', 'AUX', 'NUL'].concat(
      numbers.flatMap((digit) => [`COM${digit}`, `LPT${digit}`]),
    );
    for (const device of devices) {
      for (const name of [device, device.toLowerCase(), `${device}.wav`, `${device}.tar.gz`]) {
        expect(codesOf(name), name).toEqual(['reserved-name']);
      }
      expect(codesOf(`${device}sole.wav`), device).toEqual([]);
    }
    expect(codesOf('COM10.wav')).toEqual([]);
  });

  // Same source: no space or period at the end; a leading period is allowed but hides the file.
  it('refuses a dot or space at the end and points out hidden files', () => {
    expect(codesOf('Kick.')).toEqual(['ends-with-dot-or-space']);
    expect(codesOf('Kick ')).toEqual(['ends-with-dot-or-space']);
    expect(codesOf('.Kick')).toEqual(['hidden']);
    expect(codesOf('..')).toEqual(['empty']);
  });

  // POSIX.1: portable file names do not begin with a hyphen; NAME_MAX is 255 bytes, not characters.
  it('counts bytes as POSIX does', () => {
    expect(codesOf('-Kick.wav')).toEqual(['starts-with-hyphen']);
    expect(codesOf('a'.repeat(255))).toEqual([]);
    expect(codesOf('a'.repeat(256))).toEqual(['too-long']);
    expect(codesOf('é'.repeat(127))).toEqual([]);
    expect(codesOf('é'.repeat(128))).toEqual(['too-long']);
  });

  it('accepts the portable file name character set of POSIX.1 and letters of all scripts', () => {
    const portable = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789._-x';
    for (const name of [portable, 'Gitarre Übung.wav', '日本語.wav', 'гитара.wav', '👩‍🎤.wav']) {
      expect(codesOf(name), name).toEqual([]);
    }
  });

  it('refuses characters that nobody sees or that turn the text around', () => {
    expect(codesOf('gtr\u202Evaw.exe')).toEqual(['invisible-characters']);
    expect(codesOf('a\u200Bb')).toEqual(['invisible-characters']);
    expect(codesOf('a\uD800b')).toEqual(['invisible-characters']);
  });
});

describe('makePortable', () => {
  it('changes as little as it can', () => {
    expect(makePortable('Kick In')).toBe('Kick In');
    expect(makePortable('AC: Who? "We"/100%')).toBe("AC- Who 'We'-100");
    expect(makePortable('con.wav')).toBe('con_.wav');
    expect(makePortable(' ..-x.. ')).toBe('x');
    expect(makePortable('???')).toBe('');
  });

  it('always gives a name that passes, or nothing', () => {
    const unit = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.constantFrom('con', '.', ' ', '-', '%', 'COM¹'),
    );
    fc.assert(
      fc.property(fc.array(unit, { maxLength: 40 }), (pieces) => {
        const name = makePortable(pieces.join(''), 8);
        if (name === '') return;
        expect(checkPortability(name)).toEqual([]);
        expect(checkPortability(`${name}.wav`)).toEqual([]);
        expect(makePortable(name, 8)).toBe(name);
      }),
      { numRuns: 2000 },
    );
  });
});
