import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, type Page } from '@playwright/test';
import { run } from './outside-programs.ts';

/** Debian's sonic-pi-samples (CC0). */
const recordings = '/usr/share/sonic-pi/samples';
const form = ['-r', '48000', '-b', '24', '-c', '1'];

/** One exported track from a real recording, its peak at -6 dBFS. */
export async function exportTrack(
  path: string,
  recording: 'ambi_choir' | 'guit_e_fifths' | 'bass_woodsy_c',
  seconds = 4,
): Promise<void> {
  await run('sox', [
    ...['-D', join(recordings, `${recording}.flac`), ...form, path],
    ...['repeat', '15', 'trim', '0', String(seconds), 'norm', '-6'],
    ...['fade', 't', '0.05', '0', '0.5'],
  ]);
}

/** Clipped at full scale: a level no fixed-point file can hold. */
export async function exportClipped(path: string, recording: 'ambi_choir'): Promise<void> {
  await run('sox', [
    ...['-D', join(recordings, `${recording}.flac`), ...form, path],
    ...['repeat', '15', 'trim', '0', '4', 'norm', '-0.1', 'gain', '12'],
  ]);
}

/** A session of a voice that is clipped, a guitar and a bass, in a folder of its own. */
export async function exportSession(folder: string, name: string): Promise<string> {
  const dropped = join(folder, name);
  await mkdir(dropped);
  await exportClipped(join(dropped, 'Lead Vocal.wav'), 'ambi_choir');
  await exportTrack(join(dropped, 'Electric Guitar.wav'), 'guit_e_fifths');
  await exportTrack(join(dropped, 'Bass.wav'), 'bass_woodsy_c');
  return dropped;
}

/** Opens the empty bench and waits until it takes drops. */
export async function openBench(page: Page, address = '/check'): Promise<void> {
  await page.goto(address);
  await expect(page.getByText('Drop the exported folder here')).toBeVisible();
}
