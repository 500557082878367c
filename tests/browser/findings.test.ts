import { join } from 'node:path';
import { mkdir } from 'node:fs/promises';
import { expect, test } from '@playwright/test';
import { exportClipped, exportTrack, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { withFolder } from '../support/outside-programs.ts';
import { accessibilityProblems } from '../support/visit.ts';

test('findings are filtered, shown in the picture, and one line for many opens into its files', async ({
  page,
}) => {
  await withFolder(async (folder) => {
    const dropped = join(folder, 'Night Bus North');
    await mkdir(dropped);
    for (const voice of ['Vox 1', 'Vox 2', 'Vox 3', 'Vox 4']) {
      await exportClipped(join(dropped, `${voice}.wav`), 'ambi_choir');
    }
    await exportTrack(join(dropped, 'Bass.wav'), 'bass_woodsy_c', 3);
    await exportTrack(join(dropped, 'Egtr copy.wav'), 'guit_e_fifths');
    await openBench(page, '/check?rules=harbour-lane-mixing/1');
    await dropOnPage(page, [dropped]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    const clipped = findings.getByRole('listitem').filter({
      has: page.getByRole('heading', { name: /clip/i }),
    });
    await expect(clipped).toHaveCount(1);

    // One line, four files, each with its own place to look at and to go to.
    await clipped.getByText('The 4 files, one by one').click();
    const second = clipped.getByRole('listitem').filter({ hasText: 'Vox 2' });
    await second.getByRole('button', { name: 'Look closer and listen' }).click();
    await expect(second.getByRole('img', { name: /Waveform at/ })).toBeVisible();
    await second.getByRole('button', { name: 'Show in the picture' }).click();
    await expect(page.locator(':focus')).toHaveAccessibleName(/must fix: Clipped/);
    const mark = page.getByRole('button', { name: /must fix: Clipped/ }).nth(1);
    await expect(mark).toBeFocused();
    await expect(page.getByRole('button', { name: 'Whole song' })).toBeEnabled();

    // Only one file; the line says how many of how many that is, and the mark leads back.
    const all = await findings.getByRole('heading', { level: 3 }).count();
    await findings.getByRole('combobox', { name: 'File of the findings shown' }).click();
    await page.getByRole('option', { name: /^Bass \(/ }).click();
    const shown = await findings.getByRole('heading', { level: 3 }).count();
    expect(shown).toBeLessThan(all);
    await expect(
      findings.getByText(`${String(shown)} of ${String(all)} findings shown.`),
    ).toBeVisible();
    expect(await accessibilityProblems(page)).toEqual([]);
    await mark.click();
    await expect(findings.getByRole('heading', { level: 3 })).toHaveCount(all);
    await expect(page.locator('li:focus')).toContainText(/clip/i);
    await page.screenshot({ path: test.info().outputPath('findings.png') });
  });
});
