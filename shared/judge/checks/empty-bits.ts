import { found, type TrackCheck } from '../check.ts';

/**
 * The low bits are never used: 16-bit audio in a 24-bit file. A float file is only remarked upon
 * at 16 bits and fewer, because its 24 significant bits are all that any recording has.
 */
export const emptyBits: TrackCheck = ({ format, measures }) => {
  const used = measures.channels.map((channel) => channel.realBits ?? 0);
  const realBits = Math.max(0, ...used);
  const sounding = measures.channels.filter((channel) => channel.peakDbfs !== null);
  if (sounding.length === 0 || sounding.some((channel) => channel.realBits === null)) return null;
  const full = format.encoding === 'float' ? 17 : format.bits;
  if (realBits === 0 || realBits >= full) return null;
  return found('empty-bits', { bits: format.bits, realBits, encoding: format.encoding });
};
