import { join } from 'node:path';
import { expect, test, type Page } from '@playwright/test';
import { exportSession, openBench } from '../support/bench-session.ts';
import { dropOnPage } from '../support/drop-on-page.ts';
import { run, withFolder } from '../support/outside-programs.ts';
import { accessibilityProblems, collectComplaints, sidewaysScroll } from '../support/visit.ts';

/**
 * A visitor with two minutes: drops an exported folder, sees, listens, says what no file can show,
 * repairs, saves. No account, and nothing leaves the browser.
 */

const looks = [
  { theme: 'light', width: 1440 },
  { theme: 'dark', width: 1440 },
  { theme: 'light', width: 360 },
  { theme: 'dark', width: 360 },
] as const;

/** What is on the page as it is, in both themes, wide and narrow. */
async function lookAt(page: Page, state: string): Promise<void> {
  for (const { theme, width } of looks) {
    // Without motion, so that no colour is measured on its way from one theme to the other.
    await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' });
    await page.setViewportSize({ width, height: 900 });
    expect(await sidewaysScroll(page), `${state} ${theme} ${String(width)}`).toBeLessThanOrEqual(0);
    expect(await accessibilityProblems(page), `${state} ${theme} ${String(width)}`).toEqual([]);
    expect(await smallTargets(page), `${state} ${theme} ${String(width)}`).toEqual([]);
    await page.screenshot({
      path: test.info().outputPath(`${state}-${theme}-${String(width)}.png`),
    });
  }
  await page.setViewportSize({ width: 1440, height: 900 });
}

/** Buttons, fields and summaries under 24 px (WCAG 2.2, 2.5.8); links in sentences are exempt. */
function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate(() =>
    [...document.querySelectorAll('button, input:not([type="hidden"]), summary, [role="combobox"]')]
      .filter((element) => element.checkVisibility() && !element.closest('label, .sr-only'))
      .map((element) => ({ element, box: element.getBoundingClientRect() }))
      .filter(({ box }) => box.width > 0 && (box.width < 24 || box.height < 24))
      .map(({ element, box }) => `${element.outerHTML.slice(0, 90)} ${box.width}×${box.height}`),
  );
}

test('a visitor drops, sees, listens, repairs and saves, and nothing leaves the browser', async ({
  page,
}) => {
  test.setTimeout(240_000);
  const sent: string[] = [];
  page.on('request', (request) => {
    const body = request.postDataBuffer();
    if (request.method() !== 'GET' || body !== null) {
      sent.push(`${request.method()} ${request.url()} ${String(body?.length ?? 0)} bytes`);
    }
  });
  const complaints = collectComplaints(page);
  await withFolder(async (folder) => {
    await page.setViewportSize({ width: 1440, height: 900 });
    await openBench(page);
    await expect(page.getByText('nothing is uploaded')).toBeVisible();
    await lookAt(page, 'empty');

    await dropOnPage(page, [await exportSession(folder, 'Salt on the Windows')]);
    const findings = page.getByRole('complementary', { name: 'Findings' });
    await expect(findings.getByRole('heading', { name: /Clipped in/ })).toBeVisible();
    await expect(page.locator('canvas').first()).toBeVisible();
    await lookAt(page, 'checked');

    const clipped = findings.getByRole('listitem').filter({ hasText: /Clipped in/ });
    await clipped.getByRole('button', { name: 'Look closer and listen' }).click();
    await expect(findings.getByText('Turn the volume down before you listen.')).toBeVisible();
    await findings.getByRole('button', { name: 'Listen', exact: true }).first().click();
    await expect(findings.getByRole('button', { name: 'Stop' })).toBeVisible();
    await expect(findings.getByRole('button', { name: 'Stop' })).toHaveCount(0);
    await lookAt(page, 'close-up');

    // What no file can show.
    await page.getByRole('button', { name: 'Song details' }).click();
    await page.getByLabel('Artist').fill('Velvet Tramline');
    await page.getByLabel('Song', { exact: true }).fill('Salt on the Windows');
    await page.getByRole('radio', { name: 'It changes' }).check();
    await page.getByLabel('Beats a minute of tempo 1').fill('112');
    await page.getByRole('button', { name: 'Add a change' }).click();
    await page.getByLabel('Bar of tempo 2').fill('33');
    await page.getByLabel('Beats a minute of tempo 2').fill('118,5');
    await page.getByRole('combobox', { name: 'Add a part to what matters most' }).click();
    await page.getByRole('option', { name: 'Bass' }).click();
    await page.getByRole('combobox', { name: 'Add a part to what matters most' }).click();
    await page.getByRole('option', { name: 'Lead Vocal' }).click();
    await page.getByRole('button', { name: 'Lead Vocal: more important' }).click();
    await page.getByRole('button', { name: 'Add a link' }).click();
    await page.getByLabel('Link of reference 1').fill('https://songs.example/harbour');
    await page.getByLabel('What to listen for in reference 1').fill('How close the voice is');
    await lookAt(page, 'details');
    await page.getByRole('button', { name: 'Song details' }).click();

    // Everything said is in the report that travels along.
    await page.evaluate(() => Reflect.deleteProperty(window, 'showSaveFilePicker'));
    await expect(page.getByText(/^Velvet Tramline - Salt on the Windows.*\.zip$/)).toBeVisible();
    const downloading = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Save the zip' }).click();
    await page.getByRole('button', { name: 'Save it all the same' }).click();
    const zip = join(folder, 'saved.zip');
    await (await downloading).saveAs(zip);
    await expect(page.getByText(/handed to your downloads/)).toBeVisible();
    await lookAt(page, 'saved');
    const report = JSON.parse(await run('unzip', ['-p', zip, '*/check-report.json'])) as {
      information: Record<string, unknown>;
    };
    expect(report.information).toMatchObject({
      artist: 'Velvet Tramline',
      tempo: {
        kind: 'changes',
        changes: [
          { bar: 1, bpm: 112 },
          { bar: 33, bpm: 118.5 },
        ],
      },
      orderOfImportance: ['Lead Vocal.wav', 'Bass.wav'],
      referenceLinks: [
        { url: 'https://songs.example/harbour', moment: '', listenFor: 'How close the voice is' },
      ],
    });

    // It is remembered for the song until it is forgotten.
    await openBench(page);
    await dropOnPage(page, [join(folder, 'Salt on the Windows')]);
    await page.getByRole('button', { name: 'Song details' }).click();
    await expect(page.getByLabel('Artist')).toHaveValue('Velvet Tramline');
    await page.getByRole('button', { name: 'Forget this song' }).click();
    await expect(page.getByLabel('Artist')).toHaveValue('');
    expect(await page.evaluate(() => localStorage.getItem('flightcase.songs'))).toBe('[]');
  });
  expect(sent).toEqual([]);
  expect(complaints).toEqual([]);
});
