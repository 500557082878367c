/** A size as people say it, in decimal units: `612 MB`, `3.8 GB`. */
export function byteWords(bytes: number): string {
  const units = ['bytes', 'kB', 'MB', 'GB', 'TB'];
  let size = bytes;
  let unit = 0;
  while (size >= 1000 && unit < units.length - 1) {
    size /= 1000;
    unit += 1;
  }
  const digits = unit > 0 && size < 10 ? 1 : 0;
  return `${size.toFixed(digits)} ${units[unit]!}`;
}
