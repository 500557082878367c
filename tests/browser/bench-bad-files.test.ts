import { appendFile, mkdir, rm, truncate, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test, type Page } from '@playwright/test';
import { dropOnPage } from '../support/drop-on-page.ts';
import {
  checkIsOver,
  downloadZip,
  findingsOn,
  openBench,
  quietWave,
} from '../support/on-the-bench.ts';
import { run, withFolder } from '../support/outside-programs.ts';
import { writeSparseWave } from '../support/sparse-wave.ts';
import { collectComplaints } from '../support/visit.ts';

/**
 * Folders as they come: far too many files, names in every script, files that are empty, damaged,
 * or written to while they are read. The page says what is wrong and goes on with the rest.
 */

/** Whether a file is being read just now: the progress names it. */
async function isBeingRead(page: Page, name: string): Promise<void> {
  await expect(page.getByRole('region', { name: 'Progress' })).toContainText(name, {
    timeout: 20_000,
  });
}

test('two thousand files in folders, two hundred of them tracks, leave the page usable', async ({
  page,
}) => {
  test.setTimeout(90_000);
  await withFolder(async (folder) => {
    const dropped = join(folder, 'Everything');
    const noise = quietWave(7, 2_400 + 2000);
    const header = quietWave(7, 2_400).subarray(0, noise.length - 3 * 4_400);
    for (let index = 0; index < 2000; index++) {
      const inner = join(dropped, `bin ${String(index % 20)}`);
      await mkdir(inner, { recursive: true });
      // Every track begins elsewhere in the noise; the others are words, pictures and leftovers.
      const from = header.length + 3 * index;
      const wave = Buffer.concat([header, noise.subarray(from, from + 3 * 2_400)]);
      const ending = ['txt', 'jpg', 'mid', 'bak', 'xyz'][index % 5]!;
      if (index % 10 === 0) await writeFile(join(inner, `Take ${String(index)}.wav`), wave);
      else await writeFile(join(inner, `Leaf ${String(index)}.${ending}`), `leaf ${String(index)}`);
    }
    await openBench(page);
    await dropOnPage(page, [dropped]);
    // Asked cheaply: looking for a button by its role goes through everything on the page.
    await page.waitForFunction(
      () =>
        document.querySelectorAll('.strip').length === 200 &&
        !document.querySelector('[aria-label="Progress"]'),
      null,
      { polling: 500, timeout: 80_000 },
    );
    await expect(page.locator('h1 + *')).toContainText('2000 files');
    // It still answers: what is on screen opens, and closes again.
    await page.getByRole('button', { name: 'Song details' }).click();
    await page.getByLabel('Artist').fill('Velvet Tramline');
    await expect(page.getByLabel('Artist')).toHaveValue('Velvet Tramline');
  });
});

test('names in every script are shown and packed as they are', async ({ page }) => {
  const complaints = collectComplaints(page);
  const stems = [
    'Гитара ритм',
    'ギター ソロ',
    '主唱 合音',
    '베이스 기타',
    'עוד קולות',
    'طبلة الجهير',
    'गिटार लय',
    'เสียงร้องนำ',
    'Φωνή δύο',
    'Bäckgröund Öoh',
    'Cafe\u0301 Piano',
    '𝄞 Strings 🎻',
    "Kick (in) [2] & 'O'",
    '100 % Bass #1',
  ];
  await withFolder(async (folder) => {
    const dropped = join(folder, 'שירים 歌 Песни');
    await mkdir(dropped);
    for (const [index, stem] of stems.entries()) {
      await writeFile(join(dropped, `${stem}.wav`), quietWave(index + 1));
    }
    await openBench(page);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    for (const stem of stems) {
      await expect(page.getByText(stem, { exact: false }).first()).toBeVisible();
    }
    const zip = join(folder, 'saved.zip');
    await downloadZip(page, zip);
    expect(await run('unzip', ['-t', zip])).toContain('No errors detected');
    // Python reads the names as the zip has them (UTF-8 by bit 11).
    const names = await run('python3', [
      ...['-c', 'import sys, zipfile; print("\\n".join(zipfile.ZipFile(sys.argv[1]).namelist()))'],
      zip,
    ]);
    const scripts = ['Гитара', 'ギター', '主唱', '베이스', 'קולות', 'طبلة', 'गिटार', 'เสียงร้อง'];
    for (const word of scripts) expect(names.normalize('NFC')).toContain(word);
    const waves = names.split('\n').filter((name) => name.endsWith('.wav'));
    expect(waves).toHaveLength(stems.length);
    // A percent sign in a name is not safe in checksum lists everywhere.
    expect(waves.join()).not.toContain('%');
  });
  expect(complaints).toEqual([]);
});

test('empty, damaged and half copied files are named, and the good ones are packed', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = join(folder, 'Paper Ferry');
    await mkdir(dropped);
    const damaged = quietWave(3);
    damaged.write('dat\0', damaged.indexOf('data'), 'latin1');
    await writeFile(join(dropped, 'Bass.wav'), quietWave(1));
    await writeFile(join(dropped, 'Kick.wav'), quietWave(2));
    await writeFile(join(dropped, 'Piano damaged.wav'), damaged);
    await writeFile(join(dropped, 'Organ empty.wav'), '');
    await writeFile(join(dropped, 'Strings text.wav'), 'This is a letter, not a sound.');
    const half = quietWave(4);
    await writeFile(join(dropped, 'Vocal half.wav'), half.subarray(0, 44 + 72_000));
    await openBench(page);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    const findings = findingsOn(page);
    await expect(findings).toContainText('cannot be read');
    for (const name of ['Piano damaged', 'Organ empty', 'Strings text']) {
      await expect(findings.getByText(name).first()).toBeVisible();
    }
    await expect(findings.getByRole('heading', { name: /Cut short: .*missing/ })).toBeVisible();
    const zip = join(folder, 'saved.zip');
    await downloadZip(page, zip);
    const listed = await run('unzip', ['-Z1', zip]);
    expect(listed).toMatch(/Bass.*\.wav/);
    expect(listed).toMatch(/Kick.*\.wav/);
    expect(listed).not.toMatch(/damaged|empty|Strings/);
  });
});

test('files that are written to, cut or removed while they are read are named', async ({
  page,
}) => {
  test.setTimeout(90_000);
  await withFolder(async (folder) => {
    const dropped = join(folder, 'Still exporting');
    await mkdir(dropped);
    const longBytes = 900_000_000;
    const at = (name: string): string => join(dropped, name);
    for (const name of ['A grows.wav', 'B shrinks.wav', 'C vanishes.wav']) {
      await writeSparseWave(at(name), longBytes);
    }
    await writeFile(at('D stays.wav'), quietWave(1));
    await writeFile(at('E gone before.wav'), quietWave(2));
    await openBench(page);
    await dropOnPage(page, [dropped]);
    await isBeingRead(page, 'A grows');
    await rm(at('E gone before.wav'));
    await appendFile(at('A grows.wav'), Buffer.alloc(3000));
    await isBeingRead(page, 'B shrinks');
    await truncate(at('B shrinks.wav'), 50_000_000);
    await isBeingRead(page, 'C vanishes');
    await rm(at('C vanishes.wav'));
    // Some of it is gone for good: the page cannot pack it, and says what to do.
    await expect(page.getByRole('alert')).toContainText('Drop the folder again', {
      timeout: 60_000,
    });
    const findings = findingsOn(page);
    const changed = findings
      .locator('li')
      .filter({ hasText: /hanged during the check|annot be read/ });
    for (const name of ['A grows', 'B shrinks', 'C vanishes', 'E gone before']) {
      await expect(changed.filter({ hasText: name }).first()).toBeVisible();
    }
    await expect(changed.filter({ hasText: 'D stays' })).toHaveCount(0);

    // Exported to the end now: the same folder again, and the words are gone.
    for (const name of ['A grows.wav', 'B shrinks.wav', 'C vanishes.wav', 'E gone before.wav']) {
      await writeFile(at(name), quietWave(name.charCodeAt(0)));
    }
    await dropOnPage(page, [dropped]);
    await expect(changed).toHaveCount(0, { timeout: 20_000 });
    await checkIsOver(page);
  });
});
