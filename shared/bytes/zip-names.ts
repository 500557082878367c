/** Characters 0x80 to 0xff of code page 437, the alphabet of zip names without the UTF-8 flag. */
const upperCp437 =
  'ÇüéâäàåçêëèïîìÄÅÉæÆôöòûùÿÖÜ¢£¥₧ƒáíóúñÑªº¿⌐¬½¼¡«»░▒▓│┤╡╢╖╕╣║╗╝╜╛┐└┴┬├─┼╞╟╚╔╩╦╠═╬╧╨╤╥╙╘╒╓╫╪┘┌█▄▌▐▀αßΓπΣσµτΦΘΩδ∞φε∩≡±≥≤⌠⌡÷≈°∙·√ⁿ²■\u00a0';

/**
 * A name as an entry has it: UTF-8 where it is valid UTF-8, flagged as such or not, because one
 * widespread system packs without the flag (common practice, no source) and text of code page 437
 * is hardly ever valid UTF-8. The rest is code page 437 (APPNOTE, appendix D).
 */
export function decodeZipName(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return Array.from(bytes, (byte) =>
      byte < 0x80 ? String.fromCharCode(byte) : (upperCp437[byte - 0x80] ?? '?'),
    ).join('');
  }
}

/** What makes a name unfit to be a path below a folder; all of them are ways out of it. */
export type UnsafeName =
  'absolute-path' | 'parent-folder' | 'drive-letter' | 'backslash' | 'nul-in-name' | 'no-name';

/** The path below the dropped folder, without empty and `.` parts, or why there is none. */
export function safeZipPath(name: string): { path: string } | { unsafe: UnsafeName } {
  if (name.includes('\0')) return { unsafe: 'nul-in-name' };
  if (name.startsWith('/')) return { unsafe: 'absolute-path' };
  if (/^[a-z]:/i.test(name)) return { unsafe: 'drive-letter' };
  if (name.includes('\\')) return { unsafe: 'backslash' };
  const parts = name.split('/').filter((part) => part !== '' && part !== '.');
  if (parts.includes('..')) return { unsafe: 'parent-folder' };
  return parts.length === 0 ? { unsafe: 'no-name' } : { path: parts.join('/') };
}
