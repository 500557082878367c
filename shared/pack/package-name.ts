import type { HouseRules } from '../rules/house-rules.ts';
import type { SessionInformation } from '../session/session-information.ts';
import { safeNamePart } from './safe-names.ts';

/** Name of the package's folder, without extension. */
export function packageName(rules: HouseRules, information: SessionInformation): string {
  const { artist, title, tempo } = information;
  const known: Record<string, string | null> = {
    artist,
    title,
    tempo: tempo?.kind === 'fixed' ? String(tempo.bpm) : null,
  };
  const parts = rules.folder.template.split(' - ').flatMap((part) => {
    const tokens = [...part.matchAll(/\{(\w+)\}/g)].map(([, name]) => known[name ?? ''] ?? null);
    return tokens.includes(null)
      ? []
      : [part.replace(/\{(\w+)\}/g, (_, name: string) => known[name] ?? '')];
  });
  return safeNamePart(parts.join(' - ') || 'Multitracks');
}
