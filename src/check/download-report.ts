import { writeReport } from '#shared/report/fit-report.ts';
import type { CheckReport } from '#shared/report/check-report.ts';

/** Hands the report over as the same JSON file that lies in the zip. */
export function downloadReport(report: CheckReport): void {
  const file = new Blob([new Uint8Array(writeReport(report))], { type: 'application/json' });
  const address = URL.createObjectURL(file);
  const link = document.createElement('a');
  link.href = address;
  link.download = `${report.package.folderName} - check report.json`;
  link.click();
  // The download reads the address after the click has returned.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
