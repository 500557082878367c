import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { exportSession, exportTrack, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { withFolder } from '../support/outside-programs.ts';

/** What is mended in the recording program and exported anew is all that is read again. */

test('a folder that was dropped is read again by a button, and only what changed', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await exportSession(folder, 'Paper Ferry export');
    await openBench(page);
    await dropOnPage(page, [dropped]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    const clipped = findings.getByRole('heading', { name: /Clipped in/ });
    await expect(clipped).toBeVisible();

    await page.getByRole('button', { name: 'I exported again' }).click();
    await expect(page.getByText('Nothing changed: 3 files, the same as before.')).toBeVisible();
    await expect(clipped).toBeVisible();

    await exportTrack(join(dropped, 'Lead Vocal.wav'), 'ambi_choir');
    await rm(join(dropped, 'Bass.wav'));
    await exportTrack(join(dropped, 'Shaker.wav'), 'bass_woodsy_c');
    await page.getByRole('button', { name: 'I exported again' }).click();
    await expect(
      page.getByText(
        '2 of 3 files were new or changed, and only those were read again. 1 file is no longer there.',
      ),
    ).toBeVisible();
    await expect(clipped).toHaveCount(0);
    await expect(page.getByText('Shaker').first()).toBeVisible();
  });
});

test('without a handle the button asks for the folder and still knows what it read', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await exportSession(folder, 'Paper Ferry export');
    await page.addInitScript(() => {
      Reflect.deleteProperty(window, 'showDirectoryPicker');
      Reflect.deleteProperty(DataTransferItem.prototype, 'getAsFileSystemHandle');
    });
    await openBench(page);
    await dropOnPage(page, [dropped]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toBeVisible();
    await exportTrack(join(dropped, 'Lead Vocal.wav'), 'ambi_choir');
    const choosing = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: 'I exported again' }).click();
    await (await choosing).setFiles(dropped);
    await expect(
      page.getByText('1 of 3 files was new or changed, and only that was read again.'),
    ).toBeVisible();
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toHaveCount(0);
  });
});
