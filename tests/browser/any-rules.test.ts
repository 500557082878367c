import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { exportSession, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { withFolder } from '../support/outside-programs.ts';

test('rules come from a link or a file, and what is measured stays measured', async ({ page }) => {
  await withFolder(async (folder) => {
    const strict = join(folder, 'strict rules.json');
    await writeFile(
      strict,
      JSON.stringify({ ...defaultRules, format: { sampleRatesHz: [96_000] } }),
    );
    await openBench(page);

    // A mistake is named with its place, and the bench stays empty.
    const wrong = join(folder, 'wrong.json');
    await writeFile(wrong, JSON.stringify({ ...defaultRules, format: { sampleRatesHz: 'high' } }));
    await dropOnPage(page, [wrong]);
    await expect(page.getByRole('alert')).toContainText('format.sampleRatesHz must be a list');

    await dropOnPage(page, [strict]);
    await expect(page.getByText('Against the rules in strict rules.json.')).toBeVisible();

    await dropOnPage(page, [await exportSession(folder, 'Paper Ferry export')]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    const rate = findings.getByRole('heading', { name: /sample rate|kHz/i });
    await expect(rate.first()).toBeVisible();
    const read = page.getByText(/ read in \d/);
    const figures = await read.textContent();

    await page.getByRole('button', { name: 'Other rules' }).click();
    const dialog = page.getByRole('dialog', { name: 'Other rules' });
    await dialog.getByLabel('Link to an engineer’s house rules').fill('somewhere else');
    await dialog.getByRole('button', { name: 'Use them' }).click();
    await expect(dialog.getByText(/This is no link to house rules/)).toBeVisible();
    await dialog.getByLabel('Link to an engineer’s house rules').fill('/rules/nobody-here/3');
    await dialog.getByRole('button', { name: 'Use them' }).click();
    await expect(dialog.getByText(/There is nothing here/)).toBeVisible();
    await dialog
      .getByLabel('Link to an engineer’s house rules')
      .fill('https://flightcase.example/rules/harbour-lane-mixing/1');
    await dialog.getByRole('button', { name: 'Use them' }).click();
    await expect(dialog).toHaveCount(0);

    await expect(
      page.getByText('Against the house rules of Harbour Lane Mixing, edition 1.'),
    ).toBeVisible();
    await expect(rate).toHaveCount(0);
    await expect(
      findings.getByRole('heading', { name: 'Not named as the rules ask' }).first(),
    ).toBeVisible();
    // Nothing was read again.
    expect(await read.textContent()).toBe(figures);
  });
});
