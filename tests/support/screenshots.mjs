import { mkdir } from 'node:fs/promises';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { chromium } from '@playwright/test';
import { chromiumPath } from '../../server/dev/test-tools.mjs';

/**
 * Takes the pictures of the README from a running product:
 *
 *   node tests/support/screenshots.mjs --origin http://127.0.0.1:5180 --to pictures \
 *     --sign-in 'maren@harbour-lane.example:her password'
 *
 * --only bench,front takes some of them. Without --sign-in only the pages for everybody are taken. File names say page, theme, width.
 */

const { values } = parseArgs({
  options: {
    origin: { type: 'string' },
    to: { type: 'string' },
    only: { type: 'string' },
    'sign-in': { type: 'string' },
  },
});
if (!values.origin || !values.to) {
  console.error(
    'Usage: screenshots.mjs --origin URL --to FOLDER [--only NAMES] [--sign-in EMAIL:PASSWORD]',
  );
  process.exit(2);
}
const { origin, to } = values;
const only = values.only ? new Set(values.only.split(',')) : undefined;

/**
 * @typedef {object} Picture
 * @property {string} name
 * @property {string} at path of the page
 * @property {boolean} [whole] the whole page instead of the first screen
 * @property {(page: import('@playwright/test').Page) => Promise<void>} [prepare]
 */

/** @type {Picture[]} */
const openPictures = [
  { name: 'front', at: '/' },
  {
    name: 'front-packed',
    at: '/',
    prepare: (page) => page.getByText('As packed', { exact: true }).click(),
  },
  { name: 'check', at: '/check' },
  {
    name: 'bench',
    at: '/check?rules=harbour-lane-mixing/1',
    prepare: async (page) => {
      await page.getByRole('button', { name: 'Try it with a sample' }).click();
      await page.getByRole('button', { name: 'Save the zip' }).waitFor({ timeout: 60_000 });
      await page.waitForTimeout(500);
    },
  },
  { name: 'rules', at: '/rules/harbour-lane-mixing', whole: true },
  { name: 'design', at: '/design', whole: true },
];

/** @type {Picture[]} */
const signedInPictures = [
  { name: 'studio', at: '/studio/harbour-lane-mixing' },
  {
    name: 'project',
    at: '/projects',
    prepare: async (page) => {
      await page.getByRole('link', { name: 'Weather for Two' }).click();
      await page.getByRole('heading', { name: 'Salt on the Windows' }).waitFor();
    },
  },
  { name: 'my-checks', at: '/my/checks' },
];

const looks = [
  { theme: 'light', width: 1440, height: 900 },
  { theme: 'dark', width: 1440, height: 900 },
  { theme: 'light', width: 360, height: 740 },
  { theme: 'dark', width: 360, height: 740 },
];

/** @param {import('@playwright/test').Page} page @param {string} account EMAIL:PASSWORD */
async function signIn(page, account) {
  const colon = account.indexOf(':');
  await page.goto(`${origin}/sign-in`);
  await page.getByLabel('E-mail address').fill(account.slice(0, colon));
  await page.getByLabel('Password', { exact: true }).fill(account.slice(colon + 1));
  await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => url.pathname !== '/sign-in');
}

const browser = await chromium.launch({
  executablePath: chromiumPath,
  // Chromium refuses its sandbox to root, which is who runs it in containers.
  args: process.getuid?.() === 0 ? ['--no-sandbox', '--disable-gpu'] : ['--disable-gpu'],
});
await mkdir(to, { recursive: true });
const signedIn = await browser.newContext();
if (values['sign-in']) await signIn(await signedIn.newPage(), values['sign-in']);
const storageState = await signedIn.storageState();

for (const { theme, width, height } of looks) {
  const context = await browser.newContext({
    storageState,
    colorScheme: theme === 'dark' ? 'dark' : 'light',
    viewport: { width, height },
    deviceScaleFactor: width < 500 ? 2 : 1,
    reducedMotion: 'reduce',
  });
  const page = await context.newPage();
  const pictures = values['sign-in'] ? [...openPictures, ...signedInPictures] : openPictures;
  for (const { name, at, whole = false, prepare } of pictures) {
    if (only && !only.has(name)) continue;
    await page.goto(origin + at);
    await page.getByRole('heading', { level: 1 }).waitFor();
    await page.waitForLoadState('networkidle');
    await prepare?.(page);
    // Grey lines stand where something is still loading.
    await page.locator('.animate-pulse').first().waitFor({ state: 'detached' });
    await page.evaluate('document.fonts.ready.then(() => null)');
    const file = path.join(to, `${name}-${theme}-${width}.png`);
    await page.screenshot({ path: file, fullPage: whole });
    console.log(file);
  }
  await context.close();
}
await browser.close();
