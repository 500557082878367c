import { found, type SessionCheck } from '../check.ts';

/** All tracks agree, on a rate the house rules do not list. Converting would only add harm. */
export const sampleRateNotAllowed: SessionCheck = ({ format, rules, tracks }) => {
  const allowedHz = rules.format.sampleRatesHz;
  const { sampleRateHz } = format;
  if (sampleRateHz === null || allowedHz.length === 0 || allowedHz.includes(sampleRateHz))
    return [];
  return [
    found(
      'sample-rate-not-allowed',
      { sampleRateHz, allowedHz },
      { files: tracks.filter((t) => t.format.sampleRateHz === sampleRateHz).map((t) => t.path) },
    ),
  ];
};
