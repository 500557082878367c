import { found, type CheckedTrack, type Found, type SessionCheck } from '../check.ts';
import { peakOf } from '../track-measures.ts';

/**
 * Files with the same audio: bit for bit (one finding for all of them), or but for gain and shift.
 * A parallel copy or a moved chorus is the latter and often meant: a note.
 */
export const sameAudio: SessionCheck = (session) => {
  const { rules, comparison } = session;
  const tracks = session.tracks.filter(
    (track) => (peakOf(track) ?? -Infinity) > rules.signal.silentDbfs,
  );
  const findings: Found[] = [];
  const exact = new Map<string, CheckedTrack[]>();
  for (const track of tracks) {
    const identity = audioIdentity(track);
    exact.set(identity, [...(exact.get(identity) ?? []), track]);
  }
  for (const group of exact.values()) {
    if (group.length < 2) continue;
    findings.push(
      found(
        'same-audio',
        { kind: 'exact', gainDb: 0, shiftFrames: 0, shiftMs: 0 },
        { files: group.map((track) => track.path) },
      ),
    );
  }

  const byPath = new Map(tracks.map((track) => [track.path, track]));
  for (const match of comparison.matches) {
    const first = byPath.get(match.first);
    const second = byPath.get(match.second);
    if (!first || !second || match.inverted) continue;
    if (match.differenceUnderDb < rules.signal.sameAudioDb) continue;
    if (audioIdentity(first) === audioIdentity(second)) continue;
    findings.push(
      found(
        'same-audio',
        {
          kind: 'after-gain-or-shift',
          gainDb: match.gainDb,
          shiftFrames: match.shiftFrames,
          shiftMs: (match.shiftFrames / first.format.sampleRateHz) * 1000,
        },
        { level: 'note', files: [match.first, match.second] },
      ),
    );
  }
  return findings;
};

/** Equal for equal audio: a mono file equals a stereo file that has it on both sides. */
function audioIdentity({ measures }: CheckedTrack): string {
  const [first, ...rest] = measures.channelHashes;
  return first !== undefined && rest.every((hash) => hash === first) ? first : measures.audioHash;
}
