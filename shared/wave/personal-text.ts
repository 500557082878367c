/**
 * Places on somebody's computer and addresses of people, as programs leave them in metadata.
 * Each begins with something that nothing else begins with, so that binary chunks do not match
 * by chance: a drive letter alone is not enough, a name and a separator must follow.
 */
const pathStart =
  'file:\\/\\/|\\/(?:Users|home|Volumes|private|mnt|media|Library|Applications)\\/[ -~\\x80-\\xff]{2}|' +
  '(?<![A-Za-z])[A-Za-z]:[\\\\/][^\\\\/:*?"<>|\\x00-\\x1f]{2,64}[\\\\/.]|' +
  '\\\\\\\\[\\w.-]{2,64}\\\\[\\w$ .-]{2,64}';
const address = '[\\w.+-]{2,64}@[\\w-]{2,64}(?:\\.[A-Za-z]{2,12})+';

/** In plain text any absolute path counts; between other bytes that would match by chance. */
const textPathStart =
  `${pathStart}|(?<![A-Za-z])[A-Za-z]:[\\\\/](?=[^\\\\/\\s])|` +
  `(?<![^\\s"'=>(,;])\\/[\\w.-][^\\x00-\\x1f"<>|*?\\/]{0,63}\\/(?=[^\\s/])`;

const personal = new RegExp(`${pathStart}|${address}`);
const wholePath = new RegExp(
  `(?:${textPathStart})(?:[^\\x00-\\x1f"<>|*?]*[\\\\/](?=[^\\\\/]))?[^\\x00-\\x1f"<>|*?\\\\/]*[\\\\/]?`,
  'g',
);
const wholeAddress = new RegExp(address, 'g');

/** Whether text (Latin-1 or Unicode) tells a path on somebody's computer or an e-mail address. */
export function tellsPersonalText(text: string): boolean {
  return personal.test(text);
}

/** The same for the contents of any chunk; text of 16 bits a character is found, too. */
export function tellsPersonalBytes(bytes: Uint8Array): boolean {
  const piece = 1 << 16;
  for (let at = 0; at < bytes.length; at += piece) {
    // Overlapping, so that a path across the border is still found.
    const slice = bytes.subarray(Math.max(0, at - 512), at + piece);
    let text = '';
    for (const byte of slice) if (byte !== 0) text += String.fromCharCode(byte);
    if (tellsPersonalText(text)) return true;
  }
  return false;
}

/** Paths become the name of their last part, addresses go. Other text stays as it is. */
export function withoutPersonalText(text: string): string {
  return text.replace(wholePath, lastPart).replace(wholeAddress, '');
}

function lastPart(path: string): string {
  const parts = path.replace(/[\\/]+$/, '').split(/[\\/]/);
  const folder = parts.at(-2) ?? '';
  // Below these the last part is the person's own name.
  return /^(?:Users|home|Documents and Settings)$/i.test(folder) ? '' : (parts.at(-1) ?? '');
}
