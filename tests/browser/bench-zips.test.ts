import { deflateRawSync } from 'node:zlib';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { dropOnPage } from '../support/drop-on-page.ts';
import { checkIsOver, findingsOn, openBench, quietWave } from '../support/on-the-bench.ts';
import { withFolder } from '../support/outside-programs.ts';
import { buildZip } from '../support/zip-builder.ts';

/** Zips that mean harm or came to harm. Layout of the entries as in APPNOTE 4.3. */

test('entries that lead out of the folder, are encrypted or damaged stay out, the rest is checked', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const zip = join(folder, 'Night Bus North.zip');
    const damaged = quietWave(4);
    const entries = [
      { name: 'Night Bus North/Bass.wav', bytes: quietWave(1) },
      { name: 'Night Bus North/Kick.wav', bytes: quietWave(2), deflate: true },
      { name: '../Outside.wav', bytes: quietWave(3) },
      { name: '/etc/Absolute.wav', bytes: quietWave(3) },
      { name: 'C:/Drive.wav', bytes: quietWave(3) },
      // Bit 0 of the general purpose flags (APPNOTE 4.4.4).
      { name: 'Night Bus North/Secret.wav', bytes: quietWave(3), flags: 1 },
      { name: 'Night Bus North/More.zip', bytes: Buffer.from('PK') },
      { name: 'Night Bus North/Damaged.wav', bytes: damaged },
    ];
    const bytes = buildZip(entries);
    // One byte of sound turned over: its checksum no longer fits.
    const inside = bytes.lastIndexOf(damaged.subarray(1000, 1100));
    bytes[inside] = bytes[inside]! ^ 0xff;
    await writeFile(zip, bytes);
    await openBench(page);
    await dropOnPage(page, [zip]);
    await checkIsOver(page);

    const refused = page.getByRole('note').filter({ hasText: 'Not taken in' });
    for (const name of ['../Outside.wav', '/etc/Absolute.wav', 'C:/Drive.wav']) {
      await expect(refused).toContainText(`${name}: its name leads out of the folder`);
    }
    await expect(refused).toContainText('Secret.wav: it is encrypted');
    await expect(refused).toContainText('More.zip: a zip within a zip is not opened');
    await expect(
      findingsOn(page).locator('li').filter({ hasText: 'Cannot be read' }),
    ).toContainText('Damaged');
    await expect(page.locator('.strip')).toHaveCount(2);
  });
});

test('a zip that unpacks to far too much is refused in a sentence, and the next one is taken', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const bomb = join(folder, 'Bomb.zip');
    const zeros = Buffer.alloc(1_000_000);
    await writeFile(
      bomb,
      buildZip([
        {
          name: 'Zeros.wav',
          bytes: zeros,
          deflate: true,
          central: { unpackedBytes: 4_000_000_000 },
        },
      ]),
    );
    await openBench(page);
    await dropOnPage(page, [bomb]);
    const alert = page.getByRole('alert');
    await expect(alert).toContainText('This zip cannot be opened safely');
    await expect(alert).toContainText(/unpacks to/);

    const junk = join(folder, 'Not a zip.zip');
    await writeFile(junk, 'This is a letter, not a zip.');
    await dropOnPage(page, [junk]);
    await expect(alert).toContainText(/not a zip/);

    const good = join(folder, 'Good.zip');
    await writeFile(good, buildZip([{ name: 'Bass.wav', bytes: quietWave(1) }]));
    await dropOnPage(page, [good]);
    await checkIsOver(page);
    await expect(alert).toHaveCount(0);
  });
});

test('an entry that unpacks to more than it says is stopped, and named', async ({ page }) => {
  await withFolder(async (folder) => {
    const zip = join(folder, 'Liar.zip');
    const wave = quietWave(2);
    const longer = Buffer.concat([wave, Buffer.alloc(50_000_000)]);
    const packed = deflateRawSync(longer);
    await writeFile(
      zip,
      buildZip([
        { name: 'Bass.wav', bytes: quietWave(1) },
        // Says that it holds the wave alone; the packed bytes go on.
        { name: 'Liar.wav', bytes: packed, method: 8, central: { unpackedBytes: wave.length } },
      ]),
    );
    await openBench(page);
    await dropOnPage(page, [zip]);
    await checkIsOver(page);
    await expect(
      findingsOn(page).locator('li').filter({ hasText: 'Cannot be read' }),
    ).toContainText('Liar');
    await expect(page.locator('.strip')).toHaveCount(1);
  });
});
