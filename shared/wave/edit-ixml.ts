import { tellsPersonalText, withoutPersonalText } from './personal-text.ts';
import { parseIxml } from './read-ixml.ts';
import { xmlText, type XmlElement } from './scan-xml.ts';
import type { ChunkChange } from './travelling-chunks.ts';
import { ascii } from './write-wave-header.ts';

/** Elements whose whole content names people, places or works beyond this song. */
const personalElements =
  /^BWFXML\/(?:PROJECT|USER|LOCATION|ASWG)$|\/[^/]*(?:ORIGINATOR|ENGINEER|OPERATOR|DIRECTOR|ARTIST|AUTHOR|CONTACT|EMAIL|CLIENT|USER)[^/]*$/i;

/** What the iXML specification repeats of bext, and what is measured from the audio. */
const loudnessElements = /^BWFXML\/BEXT\/BWF_(?:LOUDNESS|MAX)_\w+$/;
const identityElements = /^BWFXML\/(?:BEXT\/BWF_UMID|FILE_UID)$/;

/**
 * An iXML chunk fit to travel: personal elements are emptied, paths in texts shortened, the time
 * follows a move, and what no longer holds for changed audio is taken out. null where it cannot
 * travel: nobody can say what is in a text that is not well formed.
 */
export function editIxml(bytes: Uint8Array, change: ChunkChange): Uint8Array | null {
  const document = parseIxml(bytes);
  if (!document) return null;
  const { text, elements } = document;
  const rate = elements.find(({ path }) => path === 'BWFXML/SPEED/TIMESTAMP_SAMPLE_RATE');
  const ownRate = rate && Number(xmlText(text, rate)) !== change.sampleRateHz;
  let edited = '';
  let copiedTo = 0;
  for (const element of elements) {
    if (element.start < copiedTo) continue;
    const inner = text.slice(element.innerStart, element.innerEnd);
    const [from, to, replacement] = editElement(element, inner, change, ownRate === true);
    if (from < copiedTo) continue;
    edited += text.slice(copiedTo, from) + replacement;
    copiedTo = to;
  }
  edited += text.slice(copiedTo);
  if (edited === text && !tellsPersonalText(text)) return bytes;
  // What is left stands in comments or attributes, where nothing useful is kept.
  if (tellsPersonalText(edited)) return null;
  return document.latin1 ? ascii(edited) : new TextEncoder().encode(edited);
}

/** Which part of the text an element's edit replaces, and by what. */
function editElement(
  element: XmlElement,
  inner: string,
  change: ChunkChange,
  ownRate: boolean,
): [from: number, to: number, replacement: string] {
  const { path, start, end, innerStart, innerEnd } = element;
  const unchanged: [number, number, string] = [start, start, ''];
  const cut: [number, number, string] = [start, end, ''];
  if (inner !== '' && personalElements.test(path)) return [innerStart, innerEnd, ''];
  if (change.audioChanged && loudnessElements.test(path)) return cut;
  if (change.audioChanged && identityElements.test(path)) return [innerStart, innerEnd, ''];
  if (change.channelsChanged && path === 'BWFXML/TRACK_LIST') return cut;
  if (change.moveByFrames !== 0 && path === 'BWFXML/SYNC_POINT_LIST') return cut;
  if (element.hasChildren) return unchanged;
  // A time counted at another rate than the file's cannot be moved by frames of the file.
  if (ownRate && change.timeReferenceFrames !== null && path.includes('/TIMESTAMP_SAMPLES'))
    return cut;
  const stamp = timeWord(path, change.timeReferenceFrames);
  if (stamp !== null && inner.trim() !== '') return [innerStart, innerEnd, String(stamp)];
  return [innerStart, innerEnd, withoutPersonalText(inner)];
}

/** The 32-bit word of the time reference an element holds; null for every other element. */
function timeWord(path: string, frames: number | null): number | null {
  if (frames === null) return null;
  switch (path) {
    case 'BWFXML/SPEED/TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_LO':
    case 'BWFXML/BEXT/BWF_TIME_REFERENCE_LOW':
      return frames % 2 ** 32;
    case 'BWFXML/SPEED/TIMESTAMP_SAMPLES_SINCE_MIDNIGHT_HI':
    case 'BWFXML/BEXT/BWF_TIME_REFERENCE_HIGH':
      return Math.floor(frames / 2 ** 32);
    default:
      return null;
  }
}
