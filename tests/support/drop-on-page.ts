import type { Page } from '@playwright/test';

/**
 * Drops files or folders of this machine on the middle of the page, as a person would: through
 * the browser's own drag events (DevTools protocol, Input.dispatchDragEvent).
 */
export async function dropOnPage(page: Page, paths: readonly string[]): Promise<void> {
  const devtools = await page.context().newCDPSession(page);
  const { width, height } = page.viewportSize() ?? { width: 1280, height: 720 };
  const place = { x: Math.round(width / 2), y: Math.round(height / 2) };
  const data = { items: [], files: [...paths], dragOperationsMask: 1 };
  for (const type of ['dragEnter', 'dragOver', 'drop'] as const) {
    await devtools.send('Input.dispatchDragEvent', { type, ...place, data });
  }
  await devtools.detach();
}
