import { mkdir, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test, type Page } from '@playwright/test';
import { dropOnPage } from '../support/drop-on-page.ts';
import {
  breakSinks,
  checkIsOver,
  openBench,
  pressSave,
  quietWave,
  readPickedFile,
  standInForPicker,
} from '../support/on-the-bench.ts';
import { run, withFolder } from '../support/outside-programs.ts';
import { writeSparseWave } from '../support/sparse-wave.ts';

/** Saving that goes wrong: a clear sentence, nothing half written, and it can be tried again. */

async function readyToSave(page: Page, folder: string, longBytes = 0): Promise<string> {
  const dropped = join(folder, 'Salt on the Windows');
  await mkdir(dropped);
  for (const [index, name] of ['Bass', 'Kick', 'Organ'].entries()) {
    await writeFile(join(dropped, `${name}.wav`), quietWave(index + 1));
  }
  if (longBytes > 0) await writeSparseWave(join(dropped, 'Vocal.wav'), longBytes);
  await openBench(page);
  await dropOnPage(page, [dropped]);
  await checkIsOver(page);
  await standInForPicker(page);
  return dropped;
}

async function zipName(page: Page): Promise<string> {
  return page
    .getByText(/\.zip$/)
    .first()
    .innerText();
}

test('a disk that is full at once or half way leaves nothing behind, and saving again works', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    await readyToSave(page, folder);
    const name = await zipName(page);
    for (const afterBytes of [null, 200_000]) {
      await breakSinks(page, { name: 'QuotaExceededError', afterBytes });
      await pressSave(page);
      const alert = page.getByRole('alert');
      await expect(alert).toContainText('The disk has no room left.');
      await expect(alert).toContainText('Free some space or choose another disk, then save again.');
      // The picker made the name; a save that broke puts nothing under it.
      expect((await readPickedFile(page, name))?.length ?? 0).toBe(0);
    }
    await breakSinks(page, null);
    await pressSave(page);
    await expect(page.getByText(/read back from the disk and found the same/)).toBeVisible();
    await expect(page.getByRole('alert')).toHaveCount(0);
    const saved = join(folder, 'saved.zip');
    await writeFile(saved, (await readPickedFile(page, name))!);
    expect(await run('unzip', ['-t', saved])).toContain('No errors detected');
  });
});

test('a place that may not be written to is said to be closed, not broken', async ({ page }) => {
  await withFolder(async (folder) => {
    await readyToSave(page, folder);
    await breakSinks(page, { name: 'NotAllowedError', afterBytes: null });
    await pressSave(page);
    await expect(page.getByRole('alert')).toContainText('could not be opened');
  });
});

test('a save that is stopped leaves what was saved before', async ({ page }) => {
  await withFolder(async (folder) => {
    await readyToSave(page, folder, 400_000_000);
    const name = await zipName(page);
    await page.evaluate(async (fileName) => {
      const root = await navigator.storage.getDirectory();
      const sink = await (await root.getFileHandle(fileName, { create: true })).createWritable();
      await sink.write('what was here before');
      await sink.close();
    }, name);
    await pressSave(page);
    await expect(page.getByText(/^Writing, [1-9]/)).toBeVisible();
    await page.getByRole('button', { name: 'Cancel' }).click();
    await expect(page.getByRole('button', { name: 'Save the zip' })).toBeEnabled();
    await expect(page.getByRole('alert')).toHaveCount(0);
    await expect
      .poll(async () => (await readPickedFile(page, name))?.toString())
      .toBe('what was here before');
  });
});

test('a file that vanished after the check is named when saving, and nothing is saved', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await readyToSave(page, folder);
    const name = await zipName(page);
    await rm(join(dropped, 'Organ.wav'));
    await pressSave(page);
    await expect(page.getByRole('alert')).toContainText('Organ.wav');
    expect((await readPickedFile(page, name))?.length ?? 0).toBe(0);

    await writeFile(join(dropped, 'Organ.wav'), quietWave(9));
    await pressSave(page);
    await expect(page.getByRole('alert')).toContainText('Organ.wav');
    // Dropped again, it is read again, and saving works.
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    await pressSave(page);
    await expect(page.getByText(/read back from the disk and found the same/)).toBeVisible();
  });
});
