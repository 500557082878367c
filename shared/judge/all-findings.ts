import type { Finding } from '../findings/finding.ts';
import type { Judgement } from './judge-session.ts';

/** Everything that was found, first about each file, then about the session. */
export function allFindings({ files, session }: Pick<Judgement, 'files' | 'session'>): Finding[] {
  return [...files.flatMap(({ findings }) => findings), ...session.findings];
}
