import type { Page } from '@playwright/test';

/** When things were on screen, in milliseconds after the drop, and what held up the page. */
export type Watched = {
  firstStripMs: number;
  firstFindingMs: number;
  /** Every file is measured. */
  readMs: number;
  /** Everything is compared, judged and shown. */
  checkedMs: number;
  longestTaskMs: number;
  tasksOver50Ms: number;
};

type Notes = {
  droppedAt: number;
  firstStripAt: number;
  firstFindingAt: number;
  readAt: number;
  checkedAt: number;
  tasks: { start: number; duration: number }[];
};

declare global {
  var benchNotes: Notes;
}

/** tsx marks functions with a helper of its own, which functions sent to a page do not find. */
export const functionNames = 'globalThis.__name ??= (named) => named';

/** Lets every page note for itself when something appears; nothing is asked while it works. */
export async function watchPage(page: Page): Promise<void> {
  await page.addInitScript(functionNames);
  await page.addInitScript(() => {
    const fresh = (droppedAt: number): Notes => ({
      droppedAt,
      ...{ firstStripAt: 0, firstFindingAt: 0, readAt: 0, checkedAt: 0, tasks: [] },
    });
    globalThis.benchNotes = fresh(0);
    new PerformanceObserver((list) => {
      for (const { startTime, duration } of list.getEntries())
        globalThis.benchNotes.tasks.push({ start: startTime, duration });
    }).observe({ type: 'longtask' });
    // Dropping counts from the event; the page begins anew with every drop.
    addEventListener('drop', () => (globalThis.benchNotes = fresh(performance.now())), true);
    const note = (): void => {
      const notes = globalThis.benchNotes;
      if (notes.droppedAt === 0 || notes.checkedAt > 0) return;
      const now = performance.now();
      const has = (selector: string): boolean => document.querySelector(selector) !== null;
      const progress = document.querySelector('[aria-label="Progress"]');
      if (!notes.firstStripAt && progress && has('.strip canvas')) notes.firstStripAt = now;
      if (!notes.firstFindingAt && progress && has('[aria-label="Findings"] h3'))
        notes.firstFindingAt = now;
      if (!notes.readAt && progress?.textContent.includes('side by side')) notes.readAt = now;
      if (notes.readAt && !progress) notes.checkedAt = now;
    };
    const observe = (): void =>
      new MutationObserver(note).observe(document.documentElement, {
        childList: true,
        subtree: true,
        characterData: true,
      });
    if (document.documentElement) observe();
    else addEventListener('DOMContentLoaded', observe);
  });
}

/** Waits for the check that was dropped last to be over. */
export async function watched(page: Page, timeoutMs: number): Promise<Watched> {
  await page.waitForFunction(() => globalThis.benchNotes.checkedAt > 0, null, {
    timeout: timeoutMs,
    polling: 200,
  });
  const notes = await page.evaluate(() => globalThis.benchNotes);
  const after = (at: number): number => (at > 0 ? at - notes.droppedAt : NaN);
  const tasks = notes.tasks.filter(({ start }) => start >= notes.droppedAt - 50);
  return {
    firstStripMs: after(notes.firstStripAt),
    firstFindingMs: after(notes.firstFindingAt),
    readMs: after(notes.readAt),
    checkedMs: after(notes.checkedAt),
    longestTaskMs: Math.max(0, ...tasks.map(({ duration }) => duration)),
    tasksOver50Ms: tasks.length,
  };
}
