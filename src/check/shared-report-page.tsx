import { usePageTitle } from '../app/page-title.ts';
import { Page } from '../app/shell.tsx';
import { PageHeader } from '../ui/page-header.tsx';

/** Holds the address until the page itself is here. */
export function SharedReportPage() {
  usePageTitle('Check a folder');
  return (
    <Page>
      <PageHeader title="Check a folder" />
    </Page>
  );
}
