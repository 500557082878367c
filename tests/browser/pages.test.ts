import { expect, test, type BrowserContextOptions, type Page } from '@playwright/test';
import {
  accessibilityProblems,
  collectComplaints,
  demoPerson,
  sidewaysScroll,
  signInThroughPage,
} from '../support/visit.ts';

/**
 * Every page of the frame, in both themes, on a desk and on a phone: axe-core finds nothing,
 * nothing scrolls sideways, the browser complains about nothing.
 */

type Visit = {
  path: string;
  /** Says that the page is there, and not its loading state. */
  heading: string | RegExp;
  /** Something that stands at the end of what is loaded. */
  waitFor?: string;
  /** Brings the page into a state worth looking at, which `state` names. */
  then?: (page: Page) => Promise<void>;
  state?: string;
};

const openPages: Visit[] = [
  { path: '/', heading: /Multitracks, packed right/ },
  {
    path: '/',
    heading: /Multitracks, packed right/,
    state: 'as packed',
    then: (page) => page.getByText('As packed', { exact: true }).click(),
  },
  { path: '/sign-in', heading: 'Sign in' },
  {
    path: '/sign-in',
    heading: 'Sign in',
    state: 'with mistakes',
    then: async (page) => {
      await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
      await expect(page.getByText('Write your password.')).toBeVisible();
    },
  },
  { path: '/register', heading: 'Make an account' },
  { path: '/confirm', heading: 'Confirm your address' },
  { path: `/confirm#token=${'A'.repeat(43)}`, heading: 'Choose a password' },
  { path: '/forgot-password', heading: 'Set a new password' },
  { path: `/reset-password#token=${'A'.repeat(43)}`, heading: 'Choose a new password' },
  { path: `/confirm-address#token=${'A'.repeat(43)}`, heading: 'Confirm your new address' },
  { path: '/rules/harbour-lane-mixing', heading: /How files must arrive/, waitFor: 'Editions' },
  { path: '/rules/harbour-lane-mixing/1', heading: /How files must arrive/, waitFor: 'Editions' },
  { path: '/nowhere', heading: 'This case is empty.' },
  { path: '/design', heading: 'Design language' },
  {
    path: '/design',
    heading: 'Design language',
    state: 'with a dialog',
    then: async (page) => {
      await page.getByRole('button', { name: 'Rename this file' }).click();
      await expect(page.getByRole('dialog')).toBeVisible();
    },
  },
  {
    path: '/design',
    heading: 'Design language',
    state: 'with a menu',
    then: async (page) => {
      await page.getByRole('button', { name: 'More' }).click();
      await expect(page.getByRole('menu')).toBeVisible();
    },
  },
  {
    path: '/design',
    heading: 'Design language',
    state: 'with a toast',
    then: async (page) => {
      await page.getByRole('button', { name: 'Toast', exact: true }).click();
      await expect(page.getByText('Link copied.')).toBeVisible();
    },
  },
];

const marensPages: Visit[] = [
  { path: '/account', heading: 'Maren Holt' },
  { path: '/my/checks', heading: 'My checks', waitFor: 'No song checked yet.' },
  { path: '/projects', heading: 'Projects', waitFor: 'Weather for Two' },
  { path: '/studio', heading: 'Studios', waitFor: 'Harbour Lane Mixing' },
  { path: '/studio/harbour-lane-mixing', heading: 'Harbour Lane Mixing', waitFor: 'Tobi Adler' },
  {
    path: '/studio/harbour-lane-mixing',
    heading: 'Harbour Lane Mixing',
    state: 'with a dialog',
    then: async (page) => {
      await page.getByRole('button', { name: 'Open a project' }).click();
      await expect(page.getByRole('dialog')).toBeVisible();
    },
  },
  { path: '/found-studio', heading: 'Found a studio' },
];

const looks = (['light', 'dark'] as const).flatMap((colorScheme) =>
  [
    { width: 1440, height: 900 },
    { width: 360, height: 740 },
  ].map((viewport) => ({ colorScheme, viewport })),
);

/** Opens the page once and looks at it in every look. */
async function examine(page: Page, visit: Visit): Promise<void> {
  const complaints = collectComplaints(page);
  await page.emulateMedia({ reducedMotion: 'reduce' });
  await page.goto(visit.path);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(visit.heading);
  if (visit.waitFor !== undefined)
    await expect(page.getByText(visit.waitFor).first()).toBeVisible();
  await visit.then?.(page);
  for (const { colorScheme, viewport } of looks) {
    await page.emulateMedia({ colorScheme });
    await page.setViewportSize(viewport);
    const look = `${colorScheme}, ${String(viewport.width)} px`;
    expect.soft(await accessibilityProblems(page), look).toEqual([]);
    expect.soft(await sidewaysScroll(page), look).toBeLessThanOrEqual(0);
  }
  expect(complaints).toEqual([]);
}

function titleOf({ path, state }: Visit): string {
  return state === undefined ? path : `${path}, ${state}`;
}

for (const visit of openPages)
  test(titleOf(visit), async ({ page }) => {
    await examine(page, visit);
  });

test.describe('an engineer', () => {
  let maren: Exclude<BrowserContextOptions['storageState'], undefined>;

  test.beforeAll(async ({ browser }) => {
    const context = await browser.newContext();
    await signInThroughPage(await context.newPage(), demoPerson('Maren Holt'));
    maren = await context.storageState();
    await context.close();
  });

  for (const visit of marensPages)
    test(titleOf(visit), async ({ browser }) => {
      const context = await browser.newContext({ storageState: maren });
      await examine(await context.newPage(), visit);
      await context.close();
    });

  test('/projects/…', async ({ browser }) => {
    const context = await browser.newContext({ storageState: maren });
    const page = await context.newPage();
    await page.goto('/projects');
    await page.getByRole('link', { name: 'Weather for Two' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('Weather for Two');
    const visit = { path: page.url(), heading: 'Weather for Two', waitFor: 'Night Bus North' };
    await examine(page, visit);
    await context.close();
  });
});

test('the choice of colours holds over a reload and comes before the first paint', async ({
  page,
}) => {
  await page.emulateMedia({ colorScheme: 'light' });
  await page.goto('/');
  await page.getByText('Dark', { exact: true }).click();
  const ground = () =>
    page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  await expect.poll(ground).toBe('rgb(19, 23, 21)');
  // Nothing but the page and its blocking script: the application itself never arrives.
  await page.route('**/assets/*.js', (route) => route.abort());
  await page.reload();
  expect(await ground()).toBe('rgb(19, 23, 21)');
});

test('the front page works by keyboard', async ({ page }) => {
  await page.goto('/');
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Skip to the page' })).toBeFocused();
  await expect(page.getByRole('link', { name: 'Skip to the page' })).toBeInViewport();
  await page.keyboard.press('Enter');
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Check a folder now' })).toBeFocused();
  await page.keyboard.press('Tab');
  await page.keyboard.press('Enter');
  await expect(page.locator('#engineers')).toBeInViewport();
});

test('a visitor’s front page asks the server for nothing but files', async ({ page }) => {
  const asked: string[] = [];
  page.on('request', (request) => {
    if (new URL(request.url()).pathname.startsWith('/api/')) asked.push(request.url());
  });
  await page.goto('/');
  await page.waitForLoadState('networkidle');
  expect(asked).toEqual([]);
});

test('targets are at least 24 pixels high and wide, or stand in a sentence', async ({ page }) => {
  // WCAG 2.2, 2.5.8 Target Size (Minimum): 24 by 24 CSS pixels; links in a sentence excepted.
  for (const path of ['/', '/sign-in', '/register', '/design', '/rules/harbour-lane-mixing']) {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    const small = await page.evaluate(() =>
      [...document.querySelectorAll('a, button, input, select, textarea, [role=combobox]')]
        .filter((target) => target.closest('p, dd') === null && target.checkVisibility())
        .map((target) => ({
          target,
          box: (target.closest('label') ?? target).getBoundingClientRect(),
        }))
        .filter(({ box }) => box.width > 1 && (box.width < 24 || box.height < 24))
        .map(({ target, box }) => `${target.outerHTML.slice(0, 120)} ${box.width} × ${box.height}`),
    );
    expect.soft(small, path).toEqual([]);
  }
});
