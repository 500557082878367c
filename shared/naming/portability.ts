/**
 * What file systems and lists of checksums take as a name. Windows: no `< > : " / \ | ? *`, no
 * characters 0 to 31, no space or full stop at the end, no device name, also not before an
 * extension (Microsoft, "Naming Files, Paths, and Namespaces"; the superscript digits of COM and
 * LPT from memory). POSIX: at most NAME_MAX = 255 bytes, not beginning with a hyphen (POSIX.1,
 * portable file name character set). NTFS and APFS: at most 255 UTF-16 units, from memory. Lists of
 * checksums: no `%` (RFC 8493, section 2.1.3, would have to escape it).
 */
export const portabilityCodes = [
  'forbidden-characters',
  'control-characters',
  'invisible-characters',
  'reserved-name',
  'ends-with-dot-or-space',
  'starts-with-space',
  'starts-with-hyphen',
  'hidden',
  'too-long',
  'empty',
] as const;
export type PortabilityCode = (typeof portabilityCodes)[number];

/** `found`: the characters, the device name, or the length in bytes; may be empty. */
export type PortabilityIssue = { code: PortabilityCode; found: string[] };

/** Longest file name in bytes of UTF-8 and in UTF-16 units, with extension. */
export const longestNameBytes = 255;

const forbidden = /[<>:"/\\|?*%]/g;
// eslint-disable-next-line no-control-regex -- control characters are what is looked for
const control = /[\u0000-\u001f\u007f-\u009f\u2028\u2029]/gu;
/** Format characters but for the joiners that scripts and emoji need, lone surrogates, unassigned. */
const invisible = /(?!\u200c|\u200d|[\u{e0020}-\u{e007f}])[\p{Cf}\p{Cs}\p{Co}\p{Cn}]/gu;
const device = /^(?:con|prn|aux|nul|com[1-9¹²³]|lpt[1-9¹²³])(?= *(?:\.|$))/i;

const encoder = new TextEncoder();

function distinct(name: string, pattern: RegExp): string[] {
  return [...new Set(name.match(pattern) ?? [])];
}

/**
 * Everything that keeps `name`, one part of a path with its extension, from being a good file name
 * on Windows, macOS and Linux. Empty: nothing does.
 */
export function checkPortability(name: string): PortabilityIssue[] {
  const issues: PortabilityIssue[] = [];
  const add = (code: PortabilityCode, found: string[] = []) => issues.push({ code, found });
  if (name === '' || name === '.' || name === '..') return [{ code: 'empty', found: [] }];
  const characters = distinct(name, forbidden);
  if (characters.length > 0) add('forbidden-characters', characters);
  const controls = distinct(name, control);
  if (controls.length > 0) add('control-characters', controls);
  const unseen = distinct(name, invisible);
  if (unseen.length > 0) add('invisible-characters', unseen);
  const reserved = device.exec(name);
  if (reserved) add('reserved-name', [reserved[0]]);
  if (/[. ]$/.test(name)) add('ends-with-dot-or-space');
  if (/^\s/u.test(name)) add('starts-with-space');
  if (name.startsWith('-')) add('starts-with-hyphen');
  if (name.startsWith('.')) add('hidden');
  const bytes = encoder.encode(name).length;
  if (bytes > longestNameBytes) add('too-long', [String(bytes)]);
  return issues;
}

/** What stands in for a character that cannot be kept; nothing for the others. */
const replacements: Readonly<Record<string, string>> = {
  '"': "'",
  ':': '-',
  '/': '-',
  '\\': '-',
  '|': '-',
};

function cutToBytes(text: string, most: number): string {
  let kept = '';
  let bytes = 0;
  for (const character of text) {
    bytes += encoder.encode(character).length;
    if (bytes > most) break;
    kept += character;
  }
  return kept;
}

/**
 * The nearest name that checkPortability has nothing against, in NFC; '' where nothing is left.
 * `reserveBytes` keeps room for what will be added behind it.
 */
export function makePortable(name: string, reserveBytes = 0): string {
  const clean = name
    .normalize('NFC')
    .replace(forbidden, (character) => replacements[character] ?? '')
    .replace(control, ' ')
    .replace(invisible, '')
    .replace(/\s+/gu, ' ')
    .replace(/^[\s.-]+/u, '');
  const short = cutToBytes(clean, longestNameBytes - reserveBytes - 1).replace(/[\s.]+$/u, '');
  return short.replace(device, '$&_');
}
