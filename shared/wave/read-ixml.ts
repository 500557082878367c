import { decodeLatin1, decodeUtf8 } from './chunk-text.ts';
import { scanXml, xmlText, type XmlElement } from './scan-xml.ts';

/** What an iXML chunk tells about one file. */
export type IxmlReading = {
  /** Frames since midnight; null if absent or counted at another rate than the file's. */
  timeReferenceFrames: number | null;
  /** The name all channels share; null if absent or different from channel to channel. */
  trackName: string | null;
};

/** More than any iXML chunk needs that was met; a longer one is not read. */
export const maxIxmlBytes = 512 * 1024;

/** `latin1`: the text was no UTF-8, each of its characters is one byte. */
export type IxmlDocument = { text: string; elements: XmlElement[]; latin1: boolean };

/** null where the bytes are no well-formed XML with the root BWFXML. */
export function parseIxml(bytes: Uint8Array): IxmlDocument | null {
  let end = bytes.length;
  while (end > 0 && bytes[end - 1] === 0) end -= 1;
  const contents = bytes.subarray(0, end);
  const utf8 = decodeUtf8(contents);
  const text = utf8 ?? decodeLatin1(contents);
  const elements = scanXml(text);
  return elements?.[0]?.path === 'BWFXML' ? { text, elements, latin1: utf8 === null } : null;
}

/** Reads the contents of an iXML chunk (the open iXML specification: SPEED, TRACK_LIST). */
export function readIxml(bytes: Uint8Array, sampleRateHz: number): IxmlReading {
  const document = parseIxml(bytes);
  if (!document) return { timeReferenceFrames: null, trackName: null };
  const texts = (path: string) =>
    document.elements
      .filter((element) => element.path === `BWFXML/${path}`)
      .map((element) => xmlText(document.text, element))
      .filter((text) => text !== '');

  const stampRate = texts('SPEED/TIMESTAMP_SAMPLE_RATE')[0];
  const low = wholeNumber(texts('SPEED/TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO')[0]);
  const high = wholeNumber(texts('SPEED/TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI')[0] ?? '0');
  const sameRate = stampRate === undefined || Number(stampRate) === sampleRateHz;
  const frames = low === null || high === null ? null : low + high * 2 ** 32;
  const names = new Set(texts('TRACK_LIST/TRACK/NAME'));
  return {
    timeReferenceFrames:
      sameRate && frames !== null && Number.isSafeInteger(frames) ? frames : null,
    trackName: names.size === 1 ? [...names][0]! : null,
  };
}

/** A 32-bit number as iXML writes it; some writers sign it. */
function wholeNumber(text: string | undefined): number | null {
  if (text === undefined || !/^-?\d{1,10}$/.test(text)) return null;
  const value = Number(text);
  return value <= 0xffffffff && value >= -0x80000000 ? value >>> 0 : null;
}
