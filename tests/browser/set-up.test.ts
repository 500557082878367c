import { expect, test } from '@playwright/test';
import { findProduct } from '../support/product.ts';

/** What every other browser test relies on: the built product, its demo people and its mail. */

test('the built product opens without a complaint of the browser', async ({ page }) => {
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    if (['error', 'warning'].includes(message.type())) complaints.push(message.text());
  });
  await page.goto('/');
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  expect(complaints).toEqual([]);
});

test('a demo person signs in, and mail reaches the local catcher', async ({ page, request }) => {
  const product = findProduct();
  const [person] = product?.signIns ?? [];
  if (!product || !person) throw new Error('The set-up announced no product.');
  const post = (path: string, data: object) =>
    request.post(path, { data, headers: { Origin: product.origin } });

  const session = await post('/api/session', { email: person.email, password: person.password });
  expect(session.status()).toBe(200);

  await post('/api/accounts/reset-requests', { email: person.email });
  await expect(async () => {
    await page.goto(product.mailPage);
    await expect(page.getByText(person.email).first()).toBeVisible({ timeout: 1000 });
  }).toPass({ timeout: 15_000 });
});
