import { copyFile, readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test, type Page } from '@playwright/test';
import { exportSession, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { run, withFolder } from '../support/outside-programs.ts';

/**
 * A package that is dropped is compared with its own list of checksums. The faulty packages are
 * made by Python's zipfile from what Info-ZIP's unzip took out of the good one.
 */

async function saveByDownload(page: Page, folder: string): Promise<string> {
  await page.evaluate(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
  const downloading = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Save the zip' }).click();
  await page.getByRole('button', { name: 'Save it all the same' }).click();
  const download = await downloading;
  const path = join(folder, download.suggestedFilename());
  await download.saveAs(path);
  return path;
}

test('a downloaded zip is dropped back and verified, and the bench stays as it is', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    await openBench(page);
    await page.getByLabel('Song').fill('Paper Ferry');
    await dropOnPage(page, [await exportSession(folder, 'Paper Ferry export')]);
    const zip = await saveByDownload(page, folder);
    await expect(page.getByText(/drop the zip here to verify it/)).toBeVisible();

    await dropOnPage(page, [zip]);
    // Three tracks, the track sheet and the report.
    await expect(page.getByText('Verified: all 5 files are what was packed.')).toBeVisible();
    await expect(page.getByText('Lead Vocal').first()).toBeVisible();
    await expect(page.getByRole('button', { name: 'I exported again' })).toBeVisible();

    const numbered = zip.replace(/\.zip$/, ' (1).zip');
    const unpacked = join(folder, 'unpacked');
    await run('unzip', ['-q', zip, '-d', unpacked]);
    const root = zip.slice(folder.length + 1).replace(/\.zip$/, '');
    await copyFile(join(unpacked, root, 'Bass.wav'), join(unpacked, root, 'Lead Vocal.wav'));
    await rename(join(unpacked, root, 'Bass.wav'), join(unpacked, root, 'Basso.wav'));
    await run('python3', ['-m', 'zipfile', '-c', numbered, join(unpacked, root)]);
    await dropOnPage(page, [numbered]);
    const notice = page.getByRole('alert').filter({ hasText: 'is not what was packed.' });
    await expect(notice).toContainText('Other bytes than were packed: Lead Vocal.wav.');
    await expect(notice).toContainText('Packed, but no longer there: Bass.wav.');
    await expect(notice).toContainText('There, but never packed: Basso.wav.');
  });
});

test('a package on the empty bench is verified and checked, without its own papers', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    await openBench(page);
    await dropOnPage(page, [await exportSession(folder, 'Paper Ferry export')]);
    const zip = await saveByDownload(page, folder);
    await openBench(page);
    await dropOnPage(page, [zip]);
    await expect(page.getByText('Verified: all 5 files are what was packed.')).toBeVisible();
    const findings = page.getByRole('complementary', { name: 'Findings' });
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toBeVisible();
    await page.getByRole('button', { name: 'Packing list' }).click();
    const list = page.getByRole('dialog', { name: 'Packing list' });
    await expect(list.getByText('SHA256SUMS.txt: a leftover')).toHaveCount(1);
    await expect(list.getByLabel('Name in the zip')).toHaveCount(3);
    await page.keyboard.press('Escape');

    // One byte in the middle of the stored audio: no other program would notice before playing it.
    const bytes = await readFile(zip);
    bytes[Math.floor(bytes.length / 2)]! ^= 1;
    const harmed = join(folder, 'harmed.zip');
    await writeFile(harmed, bytes);
    await dropOnPage(page, [harmed]);
    await expect(
      page.getByRole('alert').filter({ hasText: 'harmed.zip is not what was packed.' }),
    ).toContainText('Other bytes than were packed');
  });
});
