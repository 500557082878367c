import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test, type Page, type Worker } from '@playwright/test';
import { dropOnPage } from '../support/drop-on-page.ts';
import { checkIsOver, findingsOn, openBench, quietWave } from '../support/on-the-bench.ts';
import { withFolder } from '../support/outside-programs.ts';
import { writeSparseWave } from '../support/sparse-wave.ts';

/** Workers that end, work that is stopped, and a tab that is put to sleep. */

// What the service worker keeps for times without a network would answer for the scripts that
// are made to fail here.
test.use({ serviceWorkers: 'block' });

const longName = 'A long take';

/** One file that takes a while to read, and two that do not. */
async function makeSession(folder: string, longBytes: number): Promise<string> {
  const dropped = join(folder, 'Paper Ferry');
  await mkdir(dropped);
  await writeSparseWave(join(dropped, `${longName}.wav`), longBytes);
  await writeFile(join(dropped, 'Bass.wav'), quietWave(1));
  await writeFile(join(dropped, 'Kick.wav'), quietWave(2));
  return dropped;
}

const isMeasuring = (worker: Worker): boolean => worker.url().includes('measure.worker');

/**
 * Ends the first so many measuring workers that have the long file, without a word, as a browser
 * does that runs out of memory. Answers how many were ended so far.
 */
function endReaders(page: Page, times: number): () => number {
  let ended = 0;
  const onWorker = async (worker: Worker): Promise<void> => {
    if (!isMeasuring(worker)) return;
    // The other files take no time; what is still at work after this has the long one.
    await new Promise((resolve) => setTimeout(resolve, 400));
    if (ended >= times) return;
    ended += 1;
    await worker
      .evaluate(() => (globalThis as unknown as { close(): void }).close())
      .catch(() => null);
  };
  page.on('worker', (worker) => void onWorker(worker));
  return () => ended;
}

test('a file whose worker ends is read once more by another', async ({ page }) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 1_500_000_000);
    await openBench(page);
    // Files are read in the order of their names: the first worker has the long one.
    const ended = endReaders(page, 1);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page, 50_000);
    expect(ended()).toBe(1);
    await expect(findingsOn(page).getByText('Cannot be read')).toHaveCount(0);
    await expect(page.locator('.strip')).toHaveCount(3);
  });
});

test('a file that ends every worker is named, and the others are checked', async ({ page }) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 3_900_000_000);
    await openBench(page);
    endReaders(page, 100);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page, 50_000);
    await expect(
      findingsOn(page).locator('li').filter({ hasText: 'Cannot be read' }),
    ).toContainText(longName);
    await expect(page.locator('.strip')).toHaveCount(2);
  });
});

test('a worker script that fails to load once is asked for again', async ({ page }) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 1_000_000);
    await openBench(page);
    let asked = 0;
    await page.route(/measure\.worker/, (route) => {
      asked += 1;
      return asked === 1 ? route.abort() : route.continue();
    });
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    expect(asked).toBeGreaterThan(1);
    await expect(page.locator('.strip')).toHaveCount(3);
  });
});

test('where no worker starts the page says so, and the check can be begun again', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 1_000_000);
    await openBench(page);
    await page.route(/measure\.worker/, (route) => route.abort());
    await dropOnPage(page, [dropped]);
    await expect(page.getByRole('alert')).toContainText(
      'The part that measures the sound could not be loaded.',
    );
    await page.unroute(/measure\.worker/);
    await dropOnPage(page, [dropped]);
    await checkIsOver(page);
    await expect(page.locator('.strip')).toHaveCount(3);
  });
});

test('a check that is stopped ends at once, and the next one begins from nothing', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 3_000_000_000);
    await openBench(page);
    await dropOnPage(page, [dropped]);
    await expect(page.getByRole('region', { name: 'Progress' })).toContainText(longName);
    await page.getByRole('button', { name: 'Cancel' }).click();
    await expect(page.getByText('Drop the exported folder here')).toBeVisible({ timeout: 1000 });

    const other = join(folder, 'Night Bus North');
    await mkdir(other);
    await writeFile(join(other, 'Organ.wav'), quietWave(3));
    await dropOnPage(page, [other]);
    await checkIsOver(page);
    await expect(page.getByRole('heading', { level: 1, name: 'Night Bus North' })).toBeVisible();
    await expect(page.locator('.strip')).toHaveCount(1);
  });
});

test('a tab that is put to sleep for a while goes on where it was', async ({ page }) => {
  await withFolder(async (folder) => {
    const dropped = await makeSession(folder, 1_500_000_000);
    await openBench(page);
    const devtools = await page.context().newCDPSession(page);
    await dropOnPage(page, [dropped]);
    await expect(page.getByRole('region', { name: 'Progress' })).toContainText(longName);
    // What browsers do to tabs that were out of sight for minutes (Page Lifecycle: frozen).
    await devtools.send('Page.setWebLifecycleState', { state: 'frozen' });
    await new Promise((resolve) => setTimeout(resolve, 3000));
    await devtools.send('Page.setWebLifecycleState', { state: 'active' });
    await checkIsOver(page, 40_000);
    await expect(page.locator('.strip')).toHaveCount(3);
    await expect(findingsOn(page).getByText('Cannot be read')).toHaveCount(0);
  });
});
