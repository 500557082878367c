import type { Finding } from '../findings/finding.ts';
import type { Measures, Places } from '../measure/measures.ts';
import { maxReportBytes, type CheckReport } from './check-report.ts';

const encoder = new TextEncoder();

/** The report as it is stored and packed: JSON in UTF-8, a line feed at its end. */
export function writeReport(report: CheckReport): Uint8Array {
  return encoder.encode(`${JSON.stringify(report)}\n`);
}

/**
 * Makes a report fit into `maxReportBytes`: first fewer and fewer places, then no measures (from
 * about a thousand files on), then no findings of single files, then not all files. Verdicts and
 * totals always stay, and `shortened` says what is missing.
 */
export function fitReport(report: CheckReport): CheckReport {
  if (fits(report)) return report;
  for (const most of [50, 10, 0]) {
    const shorter = withFewerPlaces(report, most);
    if (fits(shorter)) return shorter;
  }
  const bare = withoutMeasures(withFewerPlaces(report, 0));
  if (fits(bare)) return bare;
  const lists = withoutFileFindings(bare);
  // Every halving keeps the files that come first; nobody reads the list of so many.
  for (let most = lists.files.length; ; most = Math.floor(most / 2)) {
    const shorter = withFewerFiles(lists, most);
    if (most === 0 || fits(shorter)) return shorter;
  }
}

const fits = (report: CheckReport): boolean => writeReport(report).length <= maxReportBytes;

function withFewerPlaces(report: CheckReport, most: number): CheckReport {
  const shorter = <Item extends { ranges: Finding['ranges'] }>(finding: Item): Item => ({
    ...finding,
    ranges: finding.ranges.slice(0, most),
  });
  const shorterFinding = (finding: Finding): Finding => ({
    ...shorter(finding),
    ...(finding.perFile && { perFile: finding.perFile.map(shorter) }),
  });
  return {
    ...report,
    files: report.files.map((file) => ({
      ...file,
      measures: file.measures && shorterMeasures(file.measures, most),
      findings: file.findings.map(shorter),
    })),
    session: { ...report.session, findings: report.session.findings.map(shorterFinding) },
    package: {
      ...report.package,
      entries: report.package.entries.map((entry) => ({
        ...entry,
        measures: entry.measures && shorterMeasures(entry.measures, most),
      })),
      findings: report.package.findings.map(shorterFinding),
    },
    shortened: 'places',
  };
}

function shorterMeasures(measures: Measures, most: number): Measures {
  const shorter = (places: Places): Places => ({ ...places, ranges: places.ranges.slice(0, most) });
  return {
    ...measures,
    channels: measures.channels.map((channel) => ({
      ...channel,
      clipping: { ...channel.clipping, ranges: channel.clipping.ranges.slice(0, most) },
      overFullScale: shorter(channel.overFullScale),
      notANumber: shorter(channel.notANumber),
      dropouts: shorter(channel.dropouts),
    })),
  };
}

function withoutMeasures(report: CheckReport): CheckReport {
  return {
    ...report,
    files: report.files.map((file) => ({ ...file, measures: null })),
    package: {
      ...report.package,
      entries: report.package.entries.map((entry) => ({ ...entry, measures: null })),
    },
    shortened: 'measures',
  };
}

/** Many thousand files: the lines of the session and the list of files are what is left. */
function withoutFileFindings(report: CheckReport): CheckReport {
  const withoutDetails = ({ perFile: _perFile, ...finding }: Finding): Finding => ({
    ...finding,
    files: finding.files.slice(0, 100),
  });
  return {
    ...report,
    files: report.files.map((file) => ({ ...file, findings: [] })),
    session: {
      ...report.session,
      findings: report.session.findings.map(withoutDetails),
      comparison: { matches: [], sides: [] },
    },
    package: {
      ...report.package,
      findings: report.package.findings.map(withoutDetails).slice(0, 500),
      comparison: { matches: [], sides: [] },
    },
  };
}

function withFewerFiles(report: CheckReport, most: number): CheckReport {
  return {
    ...report,
    files: report.files.slice(0, most),
    package: {
      ...report.package,
      entries: report.package.entries.slice(0, most),
      leftOut: report.package.leftOut.slice(0, most),
    },
    shortened: 'files',
  };
}
