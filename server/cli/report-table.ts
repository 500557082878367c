import { describeFinding, nextStep } from '#shared/findings/catalogue/describe-finding.ts';
import { englishFormat as format } from '#shared/findings/catalogue/format-arguments.ts';
import { levels, type Finding, type Level } from '#shared/findings/finding.ts';
import { isSettled } from '#shared/judge/verdict.ts';
import { describeOperation } from '#shared/repair/describe-operation.ts';
import type { CheckReport, ReportEntry, ReportFile } from '#shared/report/check-report.ts';
import { printable } from './say-error.ts';

export type TableOptions = {
  /** Safe repairs were asked for: what is open is then what they left. */
  repaired: boolean;
  /** Where the package was written; null where none was. */
  savedTo: string | null;
};

/** The report for somebody at a terminal: the files, what was found, what is packed. */
export function reportTable(report: CheckReport, { repaired, savedTo }: TableOptions): string {
  const open = repaired ? report.package.findings : foundInFiles(report);
  const lines = [
    ...fileTable(report.files),
    '',
    ...(repaired ? repairLines(report) : []),
    ...levels.flatMap((level) => findingLines(level, open)),
    ...leftOutLines(report),
    ...(savedTo === null ? [] : [`Saved ${printable(savedTo)}.`]),
    conclusion(report, open, repaired),
  ];
  return `${lines.join('\n')}\n`;
}

function foundInFiles({ files, session }: CheckReport): Finding[] {
  return [
    ...files.flatMap(({ path, findings }) => findings.map((one) => ({ ...one, files: [path] }))),
    ...session.findings,
  ];
}

/** Files that are measured; the rest shows in findings and among what is left out. */
function fileTable(files: readonly ReportFile[]): string[] {
  const rows = files.flatMap((file) => {
    const { format: form, measures } = file;
    if (!form || !measures) return [];
    const { sampleRateHz, frames, bits, encoding, channels } = form;
    const peaks = measures.channels.flatMap(({ peakDbfs }) => peakDbfs ?? []);
    return [
      [
        printable(file.path),
        format.time(frames / sampleRateHz, true),
        format.rate(sampleRateHz),
        format.depth(bits, encoding),
        channels === 1 ? 'mono' : channels === 2 ? 'stereo' : `${channels} channels`,
        peaks.length === 0 ? 'silent' : format.dbfs(Math.max(...peaks)),
      ],
    ];
  });
  return columns([['File', 'Length', 'Rate', 'Depth', '', 'Peak'], ...rows], [1, 2, 5]);
}

/** Columns as wide as their widest cell; those in `right` are set to the right. */
function columns(rows: readonly string[][], right: readonly number[]): string[] {
  const widths = rows[0]!.map((_, column) =>
    Math.max(...rows.map((row) => displayWidth(row[column] ?? ''))),
  );
  return rows.map((row) =>
    row
      .map((cell, column) => {
        const gap = ' '.repeat(widths[column]! - displayWidth(cell));
        return right.includes(column) ? gap + cell : cell + gap;
      })
      .join('  ')
      .trimEnd(),
  );
}

/** Columns of a terminal: wide East Asian characters take two, combining marks none. */
function displayWidth(text: string): number {
  let width = 0;
  for (const character of text.normalize('NFC')) {
    if (/\p{M}/u.test(character)) continue;
    width +=
      /[\u1100-\u115f\u2e80-\ua4cf\uac00-\ud7a3\uf900-\ufaff\uff00-\uff60]|\p{Emoji_Presentation}/u.test(
        character,
      )
        ? 2
        : 1;
  }
  return width;
}

const headings: Record<Level, string> = {
  'must-fix': 'Must be fixed',
  look: 'Worth a look',
  note: 'Good to know',
};

/** Notes that stand for nothing to do are one line each; the rest says what and how. */
function findingLines(level: Level, findings: readonly Finding[]): string[] {
  const mine = findings.filter((finding) => finding.level === level);
  if (mine.length === 0) return [];
  return [
    `${headings[level]}:`,
    ...mine.flatMap((finding) => {
      const { title, what, how } = describeFinding(finding);
      const about = finding.files.length === 0 ? '' : `${names(finding.files)}: `;
      const places = placeWords(finding);
      return [
        `  ${about}${printable(title)}${isSettled(finding) && level !== 'note' ? ' (answered)' : ''}`,
        ...(level === 'note'
          ? []
          : [`      ${printable(what)}${places}`, `      ${printable(how)}`]),
      ];
    }),
    '',
  ];
}

const namesWrittenOut = 3;

function names(files: readonly string[]): string {
  const written = files.slice(0, namesWrittenOut).map(printable).join(', ');
  const more = files.length - namesWrittenOut;
  return more > 0 ? `${written} and ${more} more` : written;
}

/** Frames are given as they are: this is for people who look them up in an editor. */
function placeWords({ ranges, places }: Finding): string {
  if (ranges.length === 0) return '';
  const first = ranges.slice(0, namesWrittenOut).map(({ startFrame }) => startFrame);
  return ` (at frame ${first.join(', ')}${places > first.length ? ' ...' : ''})`;
}

function repairLines({ package: { entries }, files }: CheckReport): string[] {
  const changed = entries.filter(({ repairs }) => repairs.length > 0);
  if (changed.length === 0) return ['Nothing had to be repaired.', ''];
  const sources = new Map(files.map((file) => [file.path, file]));
  return [
    'Repaired (the files themselves are as they were):',
    ...changed.map((entry) => `  ${repairWords(entry, sources.get(entry.from[0] ?? ''))}`),
    '',
  ];
}

function repairWords(entry: ReportEntry, source: ReportFile | undefined): string {
  const sourceFormat = source?.format;
  const words = [
    ...(entry.repairs.includes('rewrite-container') ? ['written as WAV'] : []),
    ...(sourceFormat ? entry.operations.map((one) => describeOperation(one, sourceFormat)) : []),
  ];
  const done = words.length > 0 ? ` (${words.join('; ')})` : '';
  return `${entry.from.map(printable).join(' + ')} -> ${printable(entry.to)}${done}`;
}

const leftOutReasons = {
  junk: 'not part of the music',
  'not-packable': 'cannot be packed',
  chosen: 'left out by choice',
  duplicate: 'same audio as another file',
} as const;

function leftOutLines({ package: { leftOut } }: CheckReport): string[] {
  if (leftOut.length === 0) return [];
  return [
    'Not in the package:',
    ...leftOut.map(({ path, reason }) => `  ${printable(path)}: ${leftOutReasons[reason]}`),
    '',
  ];
}

/** What to do next, counted; "no findings" promises nothing. */
function conclusion(
  { verdict }: CheckReport,
  findings: readonly Finding[],
  repaired: boolean,
): string {
  const open = findings.filter((finding) => !isSettled(finding));
  const count = (step: ReturnType<typeof nextStep>) =>
    open.filter((finding) => nextStep(finding) === step).length;
  const steps = [
    [count('export-again'), 'to export again'],
    [
      count('we-can-fix'),
      repaired ? 'that one repair could not settle' : 'that --repair safe can fix',
    ],
    [count('decide'), 'to decide'],
  ] as const;
  const next = steps.flatMap(([number, words]) => (number > 0 ? [`${number} ${words}`] : []));
  const summary = {
    ready: 'Ready: none of these checks found anything that has to be done.',
    look: 'Nothing must be fixed.',
    'must-fix': 'Not ready yet.',
  }[verdict];
  return next.length > 0 ? `${summary} ${next.join(', ')}.` : summary;
}
