import { copyFile, readFile } from 'node:fs/promises';
import { expect, type Locator, type Page } from '@playwright/test';
import { run } from './outside-programs.ts';
import { writeTestWave } from './audio-writer.ts';

/** Opens the bench and waits until it takes drops: its page is loaded when it is first asked for. */
export async function openBench(page: Page): Promise<void> {
  await page.goto('/check');
  await expect(page.getByText('Drop the exported folder here')).toBeVisible();
}

/** The findings beside the picture. */
export function findingsOn(page: Page): Locator {
  return page.getByRole('complementary', { name: 'Findings' });
}

/** Waits until everything is read, compared, judged and ready to be packed. */
export async function checkIsOver(page: Page, timeoutMs = 30_000): Promise<void> {
  await expect(page.getByRole('button', { name: 'Save the zip' })).toBeVisible({
    timeout: timeoutMs,
  });
  await expect(page.getByRole('region', { name: 'Progress' })).toBeHidden();
}

/** Where the sink of a picked file breaks; the stream into it stays the real one. */
export type SinkFault = {
  /** Name of the DOMException, as the File System standard has them. */
  name: 'QuotaExceededError' | 'NotAllowedError';
  /** Bytes that are still taken; null: the file cannot even be opened for writing. */
  afterBytes: number | null;
};

/**
 * Headless pickers close at once, so only the picker is replaced: by a real file of the origin's
 * own.
 */
export async function standInForPicker(page: Page): Promise<void> {
  await page.evaluate(() => {
    Object.assign(window, {
      showSaveFilePicker: async ({ suggestedName }: { suggestedName: string }) => {
        const root = await navigator.storage.getDirectory();
        return root.getFileHandle(suggestedName, { create: true });
      },
    });
  });
}

/**
 * Breaks the sinks of all workers that run now, or mends them (null). A handle that crosses to a
 * worker is a new object there, so the fault is put on the worker's own file handles.
 */
export async function breakSinks(page: Page, fault: SinkFault | null): Promise<void> {
  for (const worker of page.workers()) {
    await worker.evaluate((wanted) => {
      const handles = FileSystemFileHandle.prototype as FileSystemFileHandle & {
        intact?: FileSystemFileHandle['createWritable'];
      };
      // Called on the handle it belongs to, below.
      // eslint-disable-next-line @typescript-eslint/unbound-method
      const intact = (handles.intact ??= handles.createWritable);
      handles.createWritable = async function (this: FileSystemFileHandle, options) {
        if (wanted?.afterBytes === null) throw new DOMException('made to fail', wanted.name);
        const sink = await intact.call(this, options);
        const limit = wanted?.afterBytes;
        if (limit === undefined) return sink;
        let bytes = 0;
        const write = sink.write.bind(sink);
        sink.write = async (data) => {
          bytes += (data as Uint8Array).length;
          if (bytes > limit) throw new DOMException('made to fail', wanted!.name);
          await write(data);
        };
        return sink;
      };
    }, fault);
  }
}

/** The bytes of a file that was "picked", or null where there is none. */
export async function readPickedFile(page: Page, name: string): Promise<Buffer | null> {
  const base64 = await page.evaluate(async (fileName) => {
    const root = await navigator.storage.getDirectory();
    try {
      const file = await (await root.getFileHandle(fileName)).getFile();
      const bytes = new Uint8Array(await file.arrayBuffer());
      let binary = '';
      for (let at = 0; at < bytes.length; at += 0x8000)
        binary += String.fromCharCode(...bytes.subarray(at, at + 0x8000));
      return btoa(binary);
    } catch {
      return null;
    }
  }, name);
  return base64 === null ? null : Buffer.from(base64, 'base64');
}

/** Presses the button, and the one that says "all the same" where something is left to fix. */
export async function pressSave(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Save the zip' }).click();
  const anyway = page.getByRole('button', { name: 'Save it all the same' });
  // What an earlier save said may still be there, so only the question itself is waited for.
  if (
    await anyway.waitFor({ timeout: 1500 }).then(
      () => true,
      () => false,
    )
  )
    await anyway.click();
}

/** Saves by the browser's own download, through the service worker, to `path`. */
export async function downloadZip(page: Page, path: string): Promise<string> {
  await page.evaluate(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
  const arriving = page.waitForEvent('download');
  await pressSave(page);
  const download = await arriving;
  await copyFile(await download.path(), path);
  return download.suggestedFilename();
}

/** A quiet second of noise that is never the same twice: nothing about its sound is found. */
export function quietWave(seed: number, frames = 48_000, channels = 1): Buffer {
  let state = seed * 2_654_435_761 + 12_345;
  const row = (): number[] =>
    Array.from({ length: frames }, (_, frame) => {
      state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
      const ramp = Math.min(1, frame / 4800, (frames - 1 - frame) / 4800);
      return Math.round((state / 2 ** 31 - 1) * 400_000 * ramp);
    });
  return writeTestWave({
    sampleRateHz: 48_000,
    encoding: 'pcm',
    bits: 24,
    channels: Array.from({ length: channels }, row),
  });
}

/** What the packed report says went where. */
export async function packedEntries(folder: string): Promise<{ from: string[]; to: string }[]> {
  const report = JSON.parse(await readFile(`${folder}/check-report.json`, 'utf8')) as {
    package: { entries: { from: string[]; to: string }[] };
  };
  return report.package.entries;
}

/** Samples of a file after sox effects, as signed 32-bit numbers, without dither. */
export async function soxDigest(inputs: readonly string[], ...effects: string[]): Promise<string> {
  const script = 'sox -D "$@" | sha256sum';
  const form = ['-t', 'raw', '-e', 'signed', '-b', '32', '-'];
  return run('sh', ['-c', script, 'sh', ...inputs, ...form, ...effects]);
}
