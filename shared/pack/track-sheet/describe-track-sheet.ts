import { describeFinding } from '../../findings/catalogue/describe-finding.ts';
import { englishFormat as format } from '../../findings/catalogue/format-arguments.ts';
import type { Finding, Level } from '../../findings/finding.ts';
import { describeOperation } from '../../repair/describe-operation.ts';
import type { CheckReport, ReportEntry, ReportFile } from '../../report/check-report.ts';
import type { AnswerKind, SessionInformation, Tempo } from '../../session/session-information.ts';
import { fileNameOf, splitExtension } from '../../naming/safe-names.ts';

/** One track of the sheet, all of it as it is printed. */
export type SheetTrack = {
  name: string;
  form: string;
  length: string;
  peak: string;
  /** What was done to it on the way, and its old name; empty for a plain copy. */
  done: string;
};

export type SheetFinding = { level: Level; title: string; text: string; answer: string | null };

/** The contents of the sheet, before anything is drawn. */
export type TrackSheet = {
  title: string;
  artist: string;
  /** Label and value: tempo, format, length. */
  facts: [string, string][];
  tracks: SheetTrack[];
  /** What travels beside the tracks, and lists somebody gave. */
  sections: { heading: string; lines: string[] }[];
  findings: SheetFinding[];
  notes: string | null;
};

const answers: Record<AnswerKind, string> = {
  'on-purpose': 'The artist says: on purpose.',
  'all-there-is': 'The artist says: all there is.',
  'cannot-export-again': 'The artist says: cannot export again.',
};

/** Puts a report on a sheet of paper: what a mixing engineer wants beside the faders. */
export function describeTrackSheet(report: CheckReport): TrackSheet {
  const { information, session } = report;
  const sources = new Map(report.files.map((file) => [file.path, file]));
  const audio = report.package.entries.filter(({ to }) => !to.includes('/'));
  return {
    title: information.title ?? report.package.folderName,
    artist: information.artist ?? '',
    facts: facts(report, audio.length),
    tracks: audio.map((entry) => sheetTrack(entry, sources)),
    sections: [
      {
        heading: 'Order of importance',
        lines: (information.orderOfImportance ?? []).map(
          (path, index) => `${index + 1}. ${packedName(path, report)}`,
        ),
      },
      { heading: 'Tempo changes', lines: tempoChanges(information.tempo) },
      ...['Rough mix', 'References', 'Notes'].map((folder) => ({
        heading: folder,
        lines: report.package.entries
          .filter(({ to }) => to.startsWith(`${folder}/`))
          .map(({ to }) => fileNameOf(to)),
      })),
      {
        heading: 'Reference links',
        lines: information.referenceLinks.map(
          ({ url, moment, listenFor }) => `${url}  ${moment}  ${listenFor}`,
        ),
      },
      { heading: 'Not in the package', lines: leftOutLines(report) },
    ].filter(({ lines }) => lines.length > 0),
    findings: report.package.findings.map((finding) => sheetFinding(finding, information)),
    notes: information.notes,
  };

  function facts(_: CheckReport, count: number): [string, string][] {
    const rate = session.sampleRateHz;
    return [
      ['Tempo', tempoWords(information)],
      ['Metre', `${information.metre.beats}/${information.metre.unit}`],
      ['Start', startWords(information)],
      ['Tracks', String(count)],
      ['Format', rate === null ? '' : `${format.rate(rate)}, ${session.bits ?? '?'}-bit`],
      [
        'Length',
        rate === null || session.frames === null ? '' : format.time(session.frames / rate, true),
      ],
    ];
  }
}

function tempoWords({ tempo }: SessionInformation): string {
  if (tempo === null) return 'not given';
  if (tempo.kind === 'fixed') return `${tempo.bpm} BPM`;
  if (tempo.kind === 'changes') return `${tempo.changes[0]?.bpm ?? '?'} BPM at first, changing`;
  return tempo.kind === 'map' ? `see ${fileNameOf(tempo.path)}` : 'played without a click';
}

function tempoChanges(tempo: Tempo | null): string[] {
  if (tempo?.kind !== 'changes') return [];
  return tempo.changes.map(({ bar, bpm }) => `from bar ${bar}: ${bpm} BPM`);
}

function startWords({ startBar, countInBars }: SessionInformation): string {
  const countIn =
    countInBars > 0 ? `, ${format.count(countInBars, 'bar', 'bars')} of count-in` : '';
  return `files begin at bar ${startBar}${countIn}`;
}

function sheetTrack(entry: ReportEntry, sources: ReadonlyMap<string, ReportFile>): SheetTrack {
  const source = sources.get(entry.from[0] ?? '');
  const trackFormat = entry.format ?? source?.format ?? null;
  const measures = entry.measures ?? source?.measures ?? null;
  const peaks = (measures?.channels ?? []).flatMap(({ peakDbfs }) => peakDbfs ?? []);
  return {
    name: splitExtension(entry.to).base,
    form: trackFormat === null ? '' : formWords(trackFormat),
    length: trackFormat === null ? '' : format.time(trackFormat.frames / trackFormat.sampleRateHz),
    peak: measures === null ? '' : peaks.length === 0 ? 'silent' : format.dbfs(Math.max(...peaks)),
    done: doneWords(entry, source),
  };
}

function formWords({ channels, bits, encoding }: NonNullable<ReportFile['format']>): string {
  const sides = channels === 1 ? 'mono' : channels === 2 ? 'stereo' : `${channels} channels`;
  return `${sides}, ${format.depth(bits, encoding)}`;
}

function doneWords(entry: ReportEntry, source: ReportFile | undefined): string {
  const words: string[] = [];
  const { format: from } = source ?? {};
  if (entry.from.length === 2) words.push(`from ${entry.from.map(fileNameOf).join(' and ')}`);
  else if (entry.repairs.includes('rename')) words.push(`was ${fileNameOf(entry.from[0] ?? '')}`);
  if (entry.repairs.includes('rewrite-container')) words.push('written as WAV, same samples');
  if (from) words.push(...entry.operations.map((operation) => describeOperation(operation, from)));
  return words.join('; ');
}

const leftOutReasons = {
  junk: 'not part of the music',
  'not-packable': 'cannot be packed',
  chosen: 'left out by choice',
  duplicate: 'same audio as another file',
} as const;

/** What a system or a program left in the folder needs no line of its own. */
function leftOutLines({ package: { leftOut } }: CheckReport): string[] {
  return leftOut
    .filter(({ reason }) => reason !== 'junk')
    .map(({ path, reason }) => `${path}: ${leftOutReasons[reason]}`);
}

function packedName(path: string, { package: { entries } }: CheckReport): string {
  const entry = entries.find(({ from }) => from.includes(path));
  return splitExtension(fileNameOf(entry?.to ?? path)).base;
}

function sheetFinding(finding: Finding, { answers: given }: SessionInformation): SheetFinding {
  const { title, what } = describeFinding(finding);
  const remark = given.find(
    ({ code, answer }) => code === finding.code && answer === finding.answer,
  )?.remark;
  const about = finding.files.length > 0 && !finding.perFile ? format.files(finding.files) : '';
  return {
    level: finding.level,
    title: about === '' ? title : `${about}: ${title}`,
    text: what,
    answer:
      finding.answer === null
        ? null
        : [answers[finding.answer], remark].filter((words) => words !== undefined).join(' '),
  };
}
