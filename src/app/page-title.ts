import { useEffect } from 'react';

/** Names the page in the tab and in the history. */
export function usePageTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Flightcase`;
  }, [title]);
}
