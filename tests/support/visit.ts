import { expect, type APIRequestContext, type Page } from '@playwright/test';
import axe from 'axe-core';
import { findProduct, type Product } from './product.ts';

/** The product the set-up started. */
export function theProduct(): Product {
  const product = findProduct();
  if (product === undefined) throw new Error('The set-up announced no product.');
  return product;
}

/** Signs in through the page, as a person does. */
export async function signInThroughPage(
  page: Page,
  { email, password }: { email: string; password: string },
): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('main').getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { level: 1 })).not.toHaveText('Sign in');
}

/** A person of the demo data, by name. */
export function demoPerson(name: string): { email: string; password: string } {
  const person = theProduct().signIns.find(({ who }) => who.startsWith(name));
  if (person === undefined) throw new Error(`The demo data has no ${name}.`);
  return person;
}

/** Everything the browser complains about: thrown errors, refused scripts, failed loads. */
export function collectComplaints(page: Page): string[] {
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) complaints.push(message.text());
  });
  return complaints;
}

/** What axe-core finds on the page as it stands, by WCAG 2.2 A and AA and its good practices. */
export async function accessibilityProblems(page: Page): Promise<string[]> {
  // Evaluated through the debugger: the page's own security policy would refuse a script tag.
  await page.evaluate(axe.source);
  return page.evaluate(async () => {
    const { axe: engine } = window as unknown as { axe: typeof axe };
    const { violations } = await engine.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    });
    return violations.flatMap(({ id, nodes }) =>
      nodes
        // What floats over the page (a menu, a list) hangs in no landmark, by its pattern.
        .filter(({ target }) => id !== 'region' || !target.join(' ').includes('radix-popper'))
        .map((node) => `${id}: ${node.target.join(' ')} (${node.failureSummary ?? ''})`),
    );
  });
}

/** How many pixels the page is wider than the window; 0 where nothing scrolls sideways. */
export function sidewaysScroll(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
}

/** The link in the newest mail to an address whose subject fits; waits for the mail to arrive. */
export async function linkFromMail(
  request: APIRequestContext,
  to: string,
  subject: RegExp,
): Promise<string> {
  const { origin, mailPage } = theProduct();
  let link = '';
  await expect(async () => {
    const answer = await request.get(`${mailPage}/api/mails?to=${encodeURIComponent(to)}`);
    const { mails } = (await answer.json()) as { mails: { subject: string; text: string }[] };
    const mail = mails.find((candidate) => subject.test(candidate.subject));
    const found = mail?.text.match(/https?:\/\/\S+#token=[A-Za-z0-9_-]{43}/)?.[0];
    expect(found).toBeDefined();
    link = found ?? '';
  }).toPass({ timeout: 20_000 });
  expect(link.startsWith(`${origin}/`)).toBe(true);
  return link;
}
