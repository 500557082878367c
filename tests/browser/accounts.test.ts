import { expect, test } from '@playwright/test';
import { randomUUID } from 'node:crypto';
import {
  accessibilityProblems,
  linkFromMail,
  signInThroughPage,
  theProduct,
} from '../support/visit.ts';

/** The life of an account, through the pages and the real mails. */

const firstPassword = 'paper boats at low tide';
const secondPassword = 'a slower tide and larger boats';
const thirdPassword = 'no boats at all this winter';

function freshAddress(): string {
  return `juno.${randomUUID()}@velvet-tramline.example`;
}

test('register, confirm, sign in, change the password, sign out everywhere, reset', async ({
  page,
  request,
  browser,
}) => {
  const email = freshAddress();

  await test.step('register', async () => {
    await page.goto('/register');
    await page.getByLabel('Your name').fill('Juno Park');
    await page.getByLabel('E-mail address').fill(email);
    await page.getByRole('button', { name: 'Send me the link' }).click();
    await expect(page.getByRole('status')).toContainText(email);
  });

  await test.step('confirm by the link in the mail', async () => {
    await page.goto(await linkFromMail(request, email, /confirm/i));
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('Choose a password');
    expect(page.url()).toBe(`${theProduct().origin}/confirm`);
    await page.getByLabel('Password', { exact: true }).fill(firstPassword);
    await page.getByRole('button', { name: 'Make the account' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('My checks');
    await expect(page.getByRole('link', { name: 'Juno Park' })).toBeVisible();
  });

  await test.step('sign out and in again', async () => {
    await page.getByRole('link', { name: 'Juno Park' }).click();
    await page.getByRole('button', { name: 'Sign out', exact: true }).click();
    await expect(page.getByRole('banner').getByRole('link', { name: 'Sign in' })).toBeVisible();
    await page.goto('/account');
    await expect(page).toHaveURL(/\/sign-in\?next=%2Faccount$/);
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password', { exact: true }).fill(firstPassword);
    await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
    await expect(page).toHaveURL(/\/account$/);
  });

  const elsewhere = await browser.newContext();
  const otherPage = await elsewhere.newPage();

  await test.step('change the password: other devices are signed out', async () => {
    await signInThroughPage(otherPage, { email, password: firstPassword });
    const old = page.getByLabel('Password until now');
    await old.fill('not the password');
    await page.getByLabel('New password').fill(secondPassword);
    await page.getByRole('button', { name: 'Change the password' }).click();
    await expect(page.getByText('This is not your password.')).toBeVisible();
    await expect(old).toBeFocused();
    await old.fill(firstPassword);
    await page.getByRole('button', { name: 'Change the password' }).click();
    await expect(page.getByText('Your password is changed.')).toBeVisible();
    await otherPage.goto('/account');
    await expect(otherPage).toHaveURL(/\/sign-in/);
  });

  await test.step('sign out everywhere', async () => {
    await signInThroughPage(otherPage, { email, password: secondPassword });
    await page.getByRole('button', { name: 'Sign out everywhere' }).click();
    const dialog = page.getByRole('alertdialog');
    await expect(dialog.getByRole('button', { name: 'Stay signed in' })).toBeFocused();
    await dialog.getByRole('button', { name: 'Sign out everywhere' }).click();
    await expect(page.getByRole('banner').getByRole('link', { name: 'Sign in' })).toBeVisible();
    await otherPage.goto('/my/checks');
    await expect(otherPage).toHaveURL(/\/sign-in/);
    await elsewhere.close();
  });

  await test.step('reset a forgotten password', async () => {
    await page.goto('/sign-in');
    await page.getByRole('link', { name: 'Forgotten your password?' }).click();
    await page.getByLabel('E-mail address').fill(email);
    await page.getByRole('button', { name: 'Send me the link' }).click();
    await expect(page.getByRole('status')).toContainText(email);
    const link = await linkFromMail(request, email, /password/i);
    await page.goto(link);
    expect(page.url()).toBe(`${theProduct().origin}/reset-password`);
    await page.getByLabel('New password').fill(thirdPassword);
    await page.getByRole('button', { name: 'Set the new password' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('My checks');

    await page.goto('about:blank');
    await page.goto(link);
    await page.getByLabel('New password').fill(secondPassword);
    await page.getByRole('button', { name: 'Set the new password' }).click();
    await expect(page.getByRole('alert')).toContainText('This link no longer works.');
  });
});

test('an engineer founds a studio, invites an assistant, who joins with a new account', async ({
  page,
  request,
  browser,
}) => {
  const email = freshAddress();
  const assistant = freshAddress();
  const slug = `studio-${randomUUID().slice(0, 8)}`;
  await page.goto('/register');
  await page.getByLabel('Your name').fill('Ines Falk');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByRole('button', { name: 'Send me the link' }).click();
  await page.goto(await linkFromMail(request, email, /confirm/i));
  await page.getByLabel('Password', { exact: true }).fill(firstPassword);
  await page.getByRole('button', { name: 'Make the account' }).click();

  await page.getByRole('link', { name: 'Found a studio' }).click();
  await page.getByLabel('Name of the studio').fill('Café Nord');
  await expect(page.getByLabel('Web address')).toHaveValue('cafe-nord');
  await page.getByLabel('Web address').fill('harbour-lane-mixing');
  await page.getByRole('button', { name: 'Found the studio' }).click();
  await expect(page.getByText('This is already in use.')).toBeVisible();
  await page.getByLabel('Web address').fill(slug);
  await page.getByRole('button', { name: 'Found the studio' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Café Nord');
  await expect(page.getByText('Nothing is published yet.')).toBeVisible();

  await page.getByLabel('Invite an assistant').fill(assistant);
  await page.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(page.getByRole('list', { name: 'Open invitations' })).toContainText(assistant);

  await test.step('open a project', async () => {
    await page.getByRole('button', { name: 'Open a project' }).first().click();
    await page.getByLabel('Artist').fill('Velvet Tramline');
    await page.getByLabel('Project', { exact: true }).fill('Weather for Two');
    await page.getByRole('dialog').getByRole('button', { name: 'Open the project' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('Weather for Two');
    await page.getByLabel('Add a song').fill('Paper Ferry');
    await page.getByRole('button', { name: 'Add it' }).click();
    await expect(page.getByRole('heading', { name: 'Paper Ferry' })).toBeVisible();
  });

  await test.step('the assistant joins', async () => {
    const context = await browser.newContext();
    const theirs = await context.newPage();
    await theirs.goto(await linkFromMail(request, assistant, /invit/i));
    await expect(theirs.getByText(/invites you to be an assistant at Café Nord/)).toBeVisible();
    for (const colorScheme of ['light', 'dark'] as const) {
      await theirs.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
      expect(await accessibilityProblems(theirs)).toEqual([]);
    }
    await theirs.getByLabel('Your name').fill('Lou Brandt');
    await theirs.getByLabel('Password', { exact: true }).fill(firstPassword);
    await theirs.getByRole('button', { name: 'Accept the invitation' }).click();
    await expect(theirs.getByRole('heading', { level: 1 })).toHaveText('Café Nord');
    await expect(theirs.getByText('No projects yet.')).toBeVisible();
    await context.close();
  });

  await test.step('the engineer puts the assistant on the project', async () => {
    await page.reload();
    await page.getByRole('button', { name: 'Put Lou Brandt on it' }).click();
    await expect(page.getByText(assistant)).toBeVisible();
  });
});

test('an address is changed only once the new one has answered', async ({ page, request }) => {
  const email = freshAddress();
  const newEmail = freshAddress();
  await page.goto('/register');
  await page.getByLabel('Your name').fill('Sol Reyes');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByRole('button', { name: 'Send me the link' }).click();
  await page.goto(await linkFromMail(request, email, /confirm/i));
  await page.getByLabel('Password', { exact: true }).fill(firstPassword);
  await page.getByRole('button', { name: 'Make the account' }).click();
  await page.getByRole('link', { name: 'Sol Reyes' }).click();

  await page.getByLabel('New address').fill(newEmail);
  await page.getByRole('textbox', { name: 'Password', exact: true }).fill(firstPassword);
  await page.getByRole('button', { name: 'Send the link' }).click();
  await expect(page.getByText('your address stays what it is')).toBeVisible();

  await page.goto(await linkFromMail(request, newEmail, /address/i));
  expect(page.url()).toBe(`${theProduct().origin}/confirm-address`);
  await page.getByRole('button', { name: 'Use this address' }).click();
  await expect(page.getByRole('status')).toContainText(newEmail);
  await page.getByRole('main').getByRole('link', { name: 'Go to your account' }).click();
  await expect(page.getByText(newEmail)).toBeVisible();
});
