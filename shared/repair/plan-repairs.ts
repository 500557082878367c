import { allFindings } from '../judge/all-findings.ts';
import type { Judgement } from '../judge/judge-session.ts';
import {
  checksumFileName,
  fileNameOf,
  nameGiver,
  reportFileName,
  splitExtension,
  trackSheetFileName,
} from '../naming/safe-names.ts';
import type { HouseRules } from '../rules/house-rules.ts';
import { isJunk } from '../session/junk-files.ts';
import type { MeasuredFile } from '../session/measured-file.ts';
import type { SessionInformation } from '../session/session-information.ts';
import { draftEntries, type Draft, type DraftedTrack } from './draft-entries.ts';
import { nameDrafts } from './name-drafts.ts';
import type { ChosenRepair, PlannedEntry, RepairPlan } from './repair-plan.ts';

export type PlanInput = {
  files: readonly MeasuredFile[];
  judgement: Judgement;
  chosen: readonly ChosenRepair[];
  rules: HouseRules;
  information: SessionInformation;
};

/** What travels beside the audio: words, pictures, scores and tempo maps. */
const noteEndings =
  /\.(midi?|txt|md|rtf|pdf|docx?|odt|pages|csv|xlsx?|ods|lrc|musicxml|mxl|mscz|jpe?g|png|webp|gif|heic|tiff?|bmp)$/i;

const madeFileNames = [trackSheetFileName, reportFileName, checksumFileName];

/**
 * Turns what was dropped and what was chosen into the list of what is packed: which file, under
 * which name, changed how. Every file is either in an entry or left out with a reason. Names are
 * proposed anew for what is packed; names given by hand win; no two entries have the same one.
 */
export function planRepairs(input: PlanInput): RepairPlan {
  const { files, judgement, chosen } = input;
  const leftOut: RepairPlan['leftOut'] = [];
  const tracks: DraftedTrack[] = [];
  const others: PlannedEntry[] = [];
  const giveName = {
    '': nameGiver([...madeFileNames, 'Rough mix', 'References', 'Notes']),
    'Rough mix': nameGiver(),
    References: nameGiver(),
    Notes: nameGiver(),
  };

  for (const [index, file] of files.entries()) {
    const role = judgement.files[index]?.role ?? 'note';
    const { path, reading } = file;
    const listening = role === 'rough-mix' || role === 'reference';
    if (role === 'leave-out') {
      const byHand = input.information.roles[path] === 'leave-out';
      leftOut.push({ path, reason: byHand || !isJunk(path) ? 'chosen' : 'junk' });
    } else if (isJunk(path)) leftOut.push({ path, reason: 'junk' });
    else if (listening && reading.kind !== 'unreadable' && reading.kind !== 'not-audio') {
      const folder = role === 'rough-mix' ? 'Rough mix' : 'References';
      others.push(copied(path, folder, giveName[folder]));
    } else if (reading.kind === 'not-audio' && noteEndings.test(path)) {
      others.push(copied(path, 'Notes', giveName.Notes));
    } else if (reading.kind === 'track') {
      const { format, layout } = reading;
      tracks.push({ path, format, channelMask: layout.channelMask });
    } else leftOut.push({ path, reason: 'not-packable' });
  }

  const findings = allFindings(judgement);
  const drafted = draftEntries(tracks, findings, chosen);
  const names = nameDrafts(drafted.drafts, input.rules.names, input.information);
  const aiffs = new Set(
    tracks.filter(({ format }) => /^aif/.test(format.container)).map(({ path }) => path),
  );
  const entries = drafted.drafts.map((draft, index) =>
    trackEntry(draft, names[index] ?? '', aiffs.has(draft.from[0] ?? ''), giveName['']),
  );
  return {
    entries: [...entries, ...others].sort(byFolderAndName),
    leftOut: [...leftOut, ...drafted.leftOut].sort((a, b) => order(a.path, b.path)),
  };
}

type GiveName = ReturnType<typeof nameGiver>;

function copied(path: string, folder: PlannedEntry['folder'], giveName: GiveName): PlannedEntry {
  const { base, extension } = splitExtension(fileNameOf(path));
  return {
    from: [path],
    to: `${folder}/${giveName(base, extension)}`,
    folder,
    operations: [],
    rewriteAsWav: false,
  };
}

/** Endings under which every program looks for WAV or AIFF. */
const audioEnding = /^\.(wav|wave|bwf|aif|aiff|aifc)$/i;

/** A track that is rewritten or renamed ends in `.wav`; one that is copied keeps its ending. */
function trackEntry(draft: Draft, name: string, isAiff: boolean, giveName: GiveName): PlannedEntry {
  const { from, operations } = draft;
  const rewriteAsWav = draft.rewriteAsWav || operations.length > 0;
  const { extension } = splitExtension(fileNameOf(from[0] ?? ''));
  const staysAiff = isAiff && !rewriteAsWav;
  const keepsEnding = audioEnding.test(extension) && (staysAiff || !(rewriteAsWav || draft.rename));
  const ending = keepsEnding ? extension : staysAiff ? '.aif' : '.wav';
  return { from, to: giveName(name, ending), folder: '', operations, rewriteAsWav };
}

const order = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

function byFolderAndName(a: PlannedEntry, b: PlannedEntry): number {
  return order(a.folder, b.folder) || order(a.to, b.to);
}
