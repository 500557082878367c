import type { CheckReport, ReportFile } from '#shared/report/check-report.ts';
import { printable } from './say-error.ts';

/** The report for somebody at a terminal: what was found, then what is packed. */
export function reportTable(report: CheckReport): string {
  const lines = [...fileLines(report), ...sessionLines(report), '', verdictLine(report)];
  return `${lines.join('\n')}\n`;
}

function fileLines({ files }: CheckReport): string[] {
  const rows = files
    .filter(({ role }) => role !== 'leave-out')
    .map((file) => [printable(file.path), length(file), form(file), peak(file), found(file)]);
  return columns([['File', 'Length', 'Format', 'Peak', 'Found'], ...rows]);
}

function length({ format }: ReportFile): string {
  if (!format) return '';
  const seconds = format.frames / format.sampleRateHz;
  const minutes = Math.floor(seconds / 60);
  return `${minutes}:${(seconds - 60 * minutes).toFixed(1).padStart(4, '0')}`;
}

function form({ format }: ReportFile): string {
  if (!format) return '';
  const { sampleRateHz, bits, encoding, channels } = format;
  const sides = channels === 1 ? 'mono' : channels === 2 ? 'stereo' : `${channels} channels`;
  return `${sampleRateHz / 1000} kHz ${bits}${encoding === 'float' ? ' float' : ''} ${sides}`;
}

function peak({ measures }: ReportFile): string {
  if (!measures) return '';
  const peaks = measures.channels.map(({ peakDbfs }) => peakDbfs).filter((one) => one !== null);
  return peaks.length === 0 ? 'silent' : `${Math.max(...peaks).toFixed(1)} dBFS`;
}

function found({ findings }: ReportFile): string {
  return findings.map(({ code, level }) => `${level}: ${code}`).join(', ');
}

function sessionLines({ session }: CheckReport): string[] {
  return session.findings.map(
    ({ code, level, files }) => `${level}: ${code} ${files.map(printable).join(', ')}`,
  );
}

function verdictLine({ verdict }: CheckReport): string {
  return `Verdict: ${verdict}`;
}

function columns(rows: readonly string[][]): string[] {
  const widths = rows[0]!.map((_, column) =>
    Math.max(...rows.map((row) => [...(row[column] ?? '')].length)),
  );
  return rows.map((row) =>
    row
      .map((cell, column) => cell.padEnd(widths[column]!))
      .join('  ')
      .trimEnd(),
  );
}
