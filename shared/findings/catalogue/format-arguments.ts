/**
 * How arguments of findings are written. One object for each language, so that sentences in
 * another language can bring their own.
 */
export type ArgumentFormat = {
  /** A length or a moment: `3:25`, `1:02:25`; `precise`: with milliseconds if any, `0:01.250`. */
  time: (seconds: number, precise?: boolean) => string;
  /** A very short time: `12 ms`, `0.4 ms`. */
  milliseconds: (milliseconds: number) => string;
  /** `-9.3 dBFS`; above full scale with its sign. */
  dbfs: (level: number) => string;
  dbtp: (level: number) => string;
  /** A difference or a gain without sign: `3.0 dB`. */
  decibels: (difference: number) => string;
  /** `44.1 kHz`. */
  rate: (sampleRateHz: number) => string;
  /** `24-bit`, `32-bit float`. */
  depth: (bits: number, encoding?: 'pcm' | 'float') => string;
  /** `2.3 %`. */
  percent: (percent: number) => string;
  /** A number with its noun: `1 place`, `1,204 places`. */
  count: (number: number, one: string, several: string) => string;
  /** `Kick In`, of `Drums/Kick In.wav`. */
  file: (path: string) => string;
  /** `Kick In, Snare and 3 more`. */
  files: (paths: readonly string[]) => string;
  /** `48 kHz or 96 kHz`, with the word between the last two. */
  list: (items: readonly string[], word: 'and' | 'or') => string;
};

/** Names of a list that are written out before "and 3 more". */
const filesWrittenOut = 2;

export const englishFormat: ArgumentFormat = {
  time(seconds, precise = false) {
    const thousandths = Math.round(Math.abs(seconds) * 1000);
    const whole = precise ? Math.floor(thousandths / 1000) : Math.round(thousandths / 1000);
    const hours = Math.floor(whole / 3600);
    const minutes = Math.floor((whole % 3600) / 60);
    const rest = String(whole % 60).padStart(2, '0');
    const start = hours > 0 ? `${hours}:${String(minutes).padStart(2, '0')}` : `${minutes}`;
    const left = precise ? thousandths % 1000 : 0;
    return `${start}:${rest}${left > 0 ? `.${String(left).padStart(3, '0')}` : ''}`;
  },
  milliseconds(milliseconds) {
    const size = Math.abs(milliseconds);
    return `${size < 10 ? trimZeros(size.toFixed(size < 0.1 ? 2 : 1)) : grouped(Math.round(size))} ms`;
  },
  dbfs: (level) => `${signed(level)} dBFS`,
  dbtp: (level) => `${signed(level)} dBTP`,
  decibels: (difference) => `${Math.abs(difference).toFixed(1)} dB`,
  rate: (sampleRateHz) => `${trimZeros((sampleRateHz / 1000).toFixed(3))} kHz`,
  depth: (bits, encoding = 'pcm') => `${bits}-bit${encoding === 'float' ? ' float' : ''}`,
  percent: (percent) => `${trimZeros(Math.abs(percent).toFixed(1))} %`,
  count: (number, one, several) => `${grouped(number)} ${number === 1 ? one : several}`,
  file: fileTitle,
  files(paths) {
    if (paths.length <= filesWrittenOut + 1) return listed(paths.map(fileTitle), 'and');
    const written = paths.slice(0, filesWrittenOut).map(fileTitle);
    return `${written.join(', ')} and ${paths.length - filesWrittenOut} more`;
  },
  list: listed,
};

/** What a file is called on screen: without folders and extension. */
function fileTitle(path: string): string {
  const name = path.slice(path.lastIndexOf('/') + 1);
  const dot = name.lastIndexOf('.');
  return dot > 0 ? name.slice(0, dot) : name;
}

function listed(items: readonly string[], word: string): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} ${word} ${items.at(-1)}`;
}

function signed(level: number): string {
  const written = level.toFixed(1);
  if (Number(written) === 0) return '0.0';
  return level > 0 ? `+${written}` : written;
}

function trimZeros(number: string): string {
  return number.includes('.') ? number.replace(/\.?0+$/, '') : number;
}

function grouped(number: number): string {
  return String(number).replace(/\B(?=(\d{3})+$)/g, ',');
}
