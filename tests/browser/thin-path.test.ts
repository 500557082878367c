import { createHash } from 'node:crypto';
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test, type Page } from '@playwright/test';
import { dropOnPage } from '../support/drop-on-page.ts';
import { run, withFolder } from '../support/outside-programs.ts';
import { findProduct } from '../support/product.ts';

/**
 * The story end to end, on real recordings: a folder is dropped, measured in workers, found
 * faulty in three planted ways, repaired, saved by both routes, checked by other programs, and
 * its report is kept.
 *
 * Recordings: Debian's sonic-pi-samples (CC0), cut and clipped by sox.
 */

const recordings = '/usr/share/sonic-pi/samples';
const seconds = 4;
const rate = 48_000;

/**
 * A choir that is clipped by 12 dB of gain too much, and a guitar that ends a second early. Both
 * carry the same time stamp, so it is proven that they start together.
 */
async function makeFaultyFolder(folder: string): Promise<string> {
  const dropped = join(folder, 'Salt on the Windows export');
  await mkdir(dropped);
  const form = ['-r', String(rate), '-b', '24', '-c', '1'];
  const [choir, vocal, guitar] = ['choir.wav', 'vocal.wav', 'guitar.wav'].map((name) =>
    join(folder, name),
  ) as [string, string, string];
  await run('sox', [
    ...['-D', join(recordings, 'ambi_choir.flac'), ...form, choir],
    ...['repeat', '7', 'trim', '0', String(seconds), 'norm', '-0.1'],
  ]);
  await run('sox', ['-D', choir, ...form, vocal, 'gain', '12']);
  await run('sox', [
    ...['-D', join(recordings, 'guit_e_fifths.flac'), ...form, guitar],
    ...['repeat', '3', 'trim', '0', String(seconds - 1)],
    ...['fade', 't', '0', '0', '0.5', 'gain', '-6'],
  ]);
  await stamp(vocal, join(dropped, 'Track 12 (3) LdVox copy.wav'));
  await stamp(guitar, join(dropped, 'EGtr Rhy.wav'));
  return dropped;
}

/** The same samples with a broadcast time stamp of one hour (EBU Tech 3285), by ffmpeg. */
async function stamp(from: string, to: string): Promise<void> {
  await run('ffmpeg', [
    ...['-v', 'error', '-i', from, '-c:a', 'pcm_s24le', '-write_bext', '1'],
    ...['-metadata', `time_reference=${String(3600 * rate)}`, to],
  ]);
}

/** The raw samples of a WAV file, as sox reads them. */
async function samplesOf(path: string, ...effects: string[]): Promise<string> {
  const raw = `${path}.raw`;
  await run('sox', ['-D', path, '-t', 'raw', '-e', 'signed', '-b', '24', raw, ...effects]);
  return createHash('sha256')
    .update(await readFile(raw))
    .digest('hex');
}

async function signIn(page: Page, who: string): Promise<void> {
  const person = findProduct()?.signIns.find((candidate) => candidate.who.includes(who));
  if (!person) throw new Error(`The reference scenario has no ${who}.`);
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).not.toHaveURL(/sign-in/);
}

/** Headless pickers abort, so only the picker is replaced: by a real file of the origin's own. */
async function replacePicker(page: Page): Promise<void> {
  await page.evaluate(() => {
    Object.assign(window, {
      showSaveFilePicker: async ({ suggestedName }: { suggestedName: string }) => {
        const root = await navigator.storage.getDirectory();
        return root.getFileHandle(suggestedName, { create: true });
      },
    });
  });
}

async function readPickedFile(page: Page, name: string): Promise<Buffer> {
  const base64 = await page.evaluate(async (fileName) => {
    const root = await navigator.storage.getDirectory();
    const file = await (await root.getFileHandle(fileName)).getFile();
    const bytes = new Uint8Array(await file.arrayBuffer());
    let binary = '';
    for (let at = 0; at < bytes.length; at += 0x8000) {
      binary += String.fromCharCode(...bytes.subarray(at, at + 0x8000));
    }
    return btoa(binary);
  }, name);
  return Buffer.from(base64, 'base64');
}

/** The clipped vocal and the missing rough mix are named once more; saving is still allowed. */
async function saveTheZip(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Save the zip' }).click();
  const question = page.getByRole('alertdialog', { name: '2 things still must be fixed' });
  await expect(question).toContainText('Clipped in');
  await expect(question).toContainText('No rough mix');
  await question.getByRole('button', { name: 'Save it all the same' }).click();
}

test('a folder goes in and a zip that other programs accept comes out, with its report', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await makeFaultyFolder(folder);
    await signIn(page, 'Juno');
    await page.goto('/check?rules=harbour-lane-mixing/1');
    await page.getByLabel('Artist').fill('Velvet Tramline');
    await page.getByLabel('Song').fill('Salt on the Windows');
    await page.getByLabel('Tempo, BPM').fill('112');
    await dropOnPage(page, [dropped]);

    // What was planted is found, and said in words.
    const findings = page.getByRole('complementary', { name: 'Findings' });
    await expect(findings.getByRole('heading', { name: /Clipped in [\d,]+ places/ })).toBeVisible();
    await expect(findings.getByRole('heading', { name: /shorter than the session/ })).toBeVisible();
    await expect(
      findings.getByRole('heading', { name: 'Not named as the rules ask' }).first(),
    ).toBeVisible();

    await page.getByRole('button', { name: /^Fix (these \d+|this one) for me$/ }).click();
    await expect(findings.getByText('Will be renamed').first()).toBeVisible();
    await expect(findings.getByText('Silence will be added')).toBeVisible();

    const zipName = 'Velvet Tramline - Salt on the Windows - 112 BPM.zip';
    await expect(page.getByText(zipName)).toBeVisible();

    // Without a save picker the zip is an ordinary download through the service worker.
    await page.evaluate(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
    const downloading = page.waitForEvent('download');
    await saveTheZip(page);
    const download = await downloading;
    expect(download.suggestedFilename()).toBe(zipName);
    const downloaded = join(folder, 'downloaded.zip');
    await download.saveAs(downloaded);
    await expect(page.getByText(/handed to your downloads/)).toBeVisible();

    await replacePicker(page);
    await saveTheZip(page);
    await expect(page.getByText(/read back from the disk and found the same/)).toBeVisible();
    const picked = join(folder, 'picked.zip');
    await writeFile(picked, await readPickedFile(page, zipName));
    expect(await readFile(picked)).toEqual(await readFile(downloaded));

    // Other programs agree: Info-ZIP's unzip, GNU sha256sum, sox.
    expect(await run('unzip', ['-t', picked])).toContain('No errors detected');
    const out = join(folder, 'out');
    await run('unzip', ['-q', picked, '-d', out]);
    const packed = join(out, zipName.replace(/\.zip$/, ''));
    await run('sh', ['-c', 'cd "$1" && sha256sum -c --strict SHA256SUMS.txt', 'sh', packed]);
    const report = JSON.parse(await readFile(join(packed, 'check-report.json'), 'utf8')) as {
      package: { entries: { from: string[]; to: string }[] };
    };
    const entry = (name: RegExp) => {
      const found = report.package.entries.find(({ from }) => name.test(from[0] ?? ''));
      if (!found) throw new Error(`nothing was packed from ${String(name)}`);
      return found;
    };
    const vocal = entry(/LdVox/);
    const guitar = entry(/EGtr/);
    expect(vocal.to).toMatch(/^V /);
    expect(guitar.to).toMatch(/^G /);
    const lengthOf = async (path: string) => (await run('soxi', ['-s', path])).trim();
    expect(await lengthOf(join(packed, guitar.to))).toBe(String(seconds * rate));
    // Silence was added behind; everything else is as it was, bit for bit.
    expect(await samplesOf(join(packed, guitar.to))).toBe(
      await samplesOf(join(dropped, guitar.from[0] ?? ''), 'pad', '0', '1'),
    );
    expect(await samplesOf(join(packed, vocal.to))).toBe(
      await samplesOf(join(dropped, vocal.from[0] ?? '')),
    );

    // The report is kept and opens at its own address.
    await page.getByRole('button', { name: 'Store the report' }).click();
    await page.getByRole('link', { name: 'Open it' }).click();
    await expect(page).toHaveURL(/\/reports\/[0-9a-f-]{36}$/);
    await page.reload();
    await expect(
      page.getByRole('heading', { level: 1, name: 'Salt on the Windows' }),
    ).toBeVisible();
    await expect(page.getByRole('heading', { name: /Clipped in [\d,]+ places/ })).toBeVisible();
    await expect(page.getByText('Judged again here, with the same result.')).toBeVisible();
    await expect(page.locator('canvas').first()).toBeVisible();
  });
});
