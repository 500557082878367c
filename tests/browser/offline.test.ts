import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { exportSession, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { run, withFolder } from '../support/outside-programs.ts';
import { demoPerson, signInThroughPage } from '../support/visit.ts';

test('once loaded the bench works without a network, and the report waits for it', async ({
  page,
  context,
}) => {
  test.setTimeout(120_000);
  await withFolder(async (folder) => {
    await signInThroughPage(page, demoPerson('Juno'));
    await openBench(page);
    // Kept: the page itself, the meters and the workers.
    await expect
      .poll(
        () =>
          page.evaluate(async () => {
            const [name] = (await caches.keys()).filter((key) => key.startsWith('flightcase-'));
            if (name === undefined) return 0;
            const kept = await (await caches.open(name)).keys();
            return kept.filter(({ url }) => /\.wasm|worker|\/$/.test(url)).length;
          }),
        { timeout: 20_000 },
      )
      .toBeGreaterThanOrEqual(5);
    expect(
      await page.evaluate(async () => {
        const urls: string[] = [];
        for (const name of await caches.keys()) {
          for (const { url } of await (await caches.open(name)).keys()) urls.push(url);
        }
        return urls.filter((url) => new URL(url).pathname.startsWith('/api'));
      }),
    ).toEqual([]);

    await context.setOffline(true);
    // Not for the service worker either.
    const [worker] = context.serviceWorkers();
    expect(await worker?.evaluate(() => fetch('/').then(String, () => 'no network'))).toBe(
      'no network',
    );
    const dropped = await exportSession(folder, 'Paper Ferry export');
    await dropOnPage(page, [dropped]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toBeVisible();

    await page.getByRole('button', { name: 'Store the report' }).click();
    await expect(page.getByText(/The report waits in this browser/)).toBeVisible();

    // Saved without a network, track sheet and all.
    await page.evaluate(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
    const downloading = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Save the zip' }).click();
    await page.getByRole('button', { name: 'Save it all the same' }).click();
    const zip = join(folder, 'offline.zip');
    await (await downloading).saveAs(zip);
    expect(await run('unzip', ['-t', zip])).toContain('No errors detected');

    // Opened anew without a network, the bench is there and checks.
    await page.reload();
    await expect(page.getByText('Drop the exported folder here')).toBeVisible();
    await dropOnPage(page, [dropped]);
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toBeVisible();

    await context.setOffline(false);
    await openBench(page);
    await expect(page.getByText('The waiting report is stored.')).toBeVisible();
    await page.goto('/my/checks');
    await expect(page.getByText('Paper Ferry export').first()).toBeVisible();
  });
});
