import type { SessionInformation } from '../session/session-information.ts';
import { makePortable } from './portability.ts';

type SongFacts = Pick<SessionInformation, 'artist' | 'title' | 'tempo'>;

/** Where neither artist nor title nor tempo is known. */
const unnamedFolder = 'Multitracks';

/** Room for an extension behind the folder's name: the zip has the same name. */
const extensionBytes = 8;

function valuesOf({ artist, title, tempo }: SongFacts): Record<string, string> {
  const known: Record<string, string> = {};
  if (artist?.trim()) known['artist'] = artist.trim();
  if (title?.trim()) known['title'] = title.trim();
  if (tempo?.kind === 'fixed') known['tempo'] = String(Math.round(tempo.bpm * 1000) / 1000);
  return known;
}

type Piece = { kind: 'token' | 'word' | 'space' | 'open' | 'close' | 'separator'; text: string };

const pieces =
  /\{(?<token>\w+)\}|(?<open>[([]+)|(?<close>[)\]]+)|(?<word>[\p{L}\p{N}\p{M}'’]+)|(?<space>\s+)|(?<separator>[^\s\p{L}\p{N}\p{M}(){}[\]]+|[{}])/gu;

function split(template: string): Piece[] {
  return [...template.matchAll(pieces)].map(({ groups = {} }) => {
    const [kind, text = ''] = Object.entries(groups).find(([, value]) => value !== undefined) ?? [];
    return { kind: kind as Piece['kind'], text };
  });
}

/** A token with the words and brackets that only make sense beside it, and what stood before it. */
type Cluster = { before: string; text: string; missing: boolean; hasToken: boolean };

/** Words that say what the number in front of them is. */
const units = /^bpm$/i;

function cluster(template: string, values: Record<string, string>): Cluster[] {
  const clusters: Cluster[] = [];
  let gap = '';
  let open: Cluster | null = null;
  for (const { kind, text } of split(template)) {
    if (kind === 'separator' || kind === 'space') {
      if (kind === 'separator') open = null;
      gap += text;
      continue;
    }
    const unit = kind === 'word' && units.test(text);
    const closes = kind === 'close' || unit;
    const current = open ?? (closes && gap.trim() === '' ? (clusters.at(-1) ?? null) : null);
    if (current && (closes || !current.hasToken)) {
      current.text += (kind === 'close' ? '' : gap) + valueOf(kind, text, values);
      note(current, kind, text, values);
    } else {
      const next: Cluster = {
        before: gap,
        text: valueOf(kind, text, values),
        missing: false,
        hasToken: false,
      };
      note(next, kind, text, values);
      clusters.push(next);
    }
    gap = '';
    const latest: Cluster | undefined = clusters.at(-1);
    open = latest && !latest.hasToken ? latest : null;
  }
  return clusters;
}

function valueOf(kind: Piece['kind'], text: string, values: Record<string, string>): string {
  return kind === 'token' ? (values[text] ?? '') : text;
}

function note(target: Cluster, kind: Piece['kind'], text: string, values: Record<string, string>) {
  if (kind !== 'token') return;
  target.hasToken = true;
  target.missing = values[text] === undefined;
}

/**
 * The name of the package's folder and zip: `{artist} - {title} - {tempo} BPM` filled in. A token
 * that is not known takes its separator along, and the words that belong to it (`by {artist}`,
 * `{tempo} BPM`). Safe on every system; never empty.
 */
export function folderName(template: string, information: SongFacts): string {
  const clusters = cluster(template, valuesOf(information));
  const kept = clusters.filter(({ missing }) => !missing);
  const says = kept.some(({ hasToken }) => hasToken) || !clusters.some(({ hasToken }) => hasToken);
  const filled = kept.map(({ before, text }, index) => (index === 0 ? '' : before) + text).join('');
  return (says && makePortable(filled, extensionBytes)) || makePortable(unnamedFolder);
}
