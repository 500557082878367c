import { clashKey } from './fold-name.ts';

/**
 * Names that every file system and every checksum tool takes. Windows: no `< > : " / \ | ? *`, no
 * control characters, no space or full stop at the end, no device names (Microsoft, "Naming Files,
 * Paths, and Namespaces"). Lists of checksums: no `%`, no line break (RFC 8493 section 2.1.3 and
 * GNU `sha256sum` both would have to escape them). At most 255 bytes a part (Linux NAME_MAX).
 */

export const trackSheetFileName = 'Track sheet.pdf';
export const reportFileName = 'check-report.json';
export const checksumFileName = 'SHA256SUMS.txt';

/** Room is kept for ` (1000)` and an extension behind the part that is cut. */
const longestPartBytes = 255;

const forbidden = /[\p{Cc}\p{Cf}\p{Cs}\p{Co}\p{Cn}\p{Zl}\p{Zp}<>:"/\\|?*%]/gu;

const deviceName = /^(con|prn|aux|nul|com[0-9¹²³]|lpt[0-9¹²³])(\.|$)/i;

/** Joiners that some scripts need inside a word, though they are format characters. */
const joiners = /[\u200c\u200d]/;

/** One part of a path, made safe; `_` where nothing would be left. `extension` begins with a dot. */
export function safeNamePart(name: string, extension = ''): string {
  let safe = name
    .normalize('NFC')
    .replace(forbidden, (character) => (joiners.test(character) ? character : '_'))
    .replace(/\s+/gu, ' ')
    .trim();
  // A leading dot hides the file, a leading hyphen looks like an option to a program.
  safe = safe.replace(/^[.\-~ ]+/, '');
  safe = cutToBytes(safe, longestPartBytes - byteLength(extension)).replace(/[. ]+$/, '');
  if (deviceName.test(safe + extension)) safe = `_${safe}`;
  return (safe === '' ? '_' : safe) + extension;
}

const encoder = new TextEncoder();
const byteLength = (text: string): number => encoder.encode(text).length;

/** Cut between characters as people see them where the platform knows them, never inside one. */
function cutToBytes(text: string, most: number): string {
  let kept = '';
  let bytes = 0;
  for (const character of text) {
    bytes += byteLength(character);
    if (bytes > most) break;
    kept += character;
  }
  return kept;
}

/** `Kick.In.WAV` -> `Kick.In` and `.WAV`; a name without extension has an empty one. */
export function splitExtension(fileName: string): { base: string; extension: string } {
  const dot = fileName.lastIndexOf('.');
  const looksLikeOne = dot > 0 && /^\.[A-Za-z0-9]{1,8}$/.test(fileName.slice(dot));
  return looksLikeOne
    ? { base: fileName.slice(0, dot), extension: fileName.slice(dot) }
    : { base: fileName, extension: '' };
}

/** Last part of a path. */
export const fileNameOf = (path: string): string => path.slice(path.lastIndexOf('/') + 1);

/** Hands out names in one folder and never the same twice: the second gets ` (2)`. */
export function nameGiver(
  taken: Iterable<string> = [],
): (base: string, extension: string) => string {
  const keys = new Set([...taken].map(clashKey));
  return (base, extension) => {
    for (let copy = 1; ; copy++) {
      const suffix = copy === 1 ? '' : ` (${copy})`;
      const name = safeNamePart(base, suffix + extension);
      const key = clashKey(name);
      if (keys.has(key)) continue;
      keys.add(key);
      return name;
    }
  };
}
