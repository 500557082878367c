import { bytesSource, type DroppedFile } from '#shared/bytes/byte-source.ts';
import { checkSession, repairSession } from '#shared/check.ts';
import { createOracle } from '#shared/measure/oracle/create-oracle.ts';
import type { Overview } from '#shared/measure/overview.ts';
import { safeRepairs } from '#shared/repair/choose-repairs.ts';
import { buildReport } from '#shared/report/build-report.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { writeOverviews } from '#shared/report/stored-overviews.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { measureHere } from '#shared/session/measure-file.ts';
import { emptySessionInformation } from '#shared/session/session-information.ts';
import { sine, writeTestWave } from './audio-writer.ts';

const frames = 4_800;

function wave(path: string, channels: number[][]): DroppedFile {
  const bytes = writeTestWave({ sampleRateHz: 48_000, encoding: 'pcm', bits: 24, channels });
  const source = bytesSource(bytes);
  return {
    path,
    size: bytes.length,
    open: () => Promise.resolve({ ...source, close: () => Promise.resolve() }),
  };
}

/** Clipped for three hundred samples in a row, among other waves. */
function clipped(): number[] {
  const top = 2 ** 23 - 1;
  return sine(frames, 24, 9).map((value, index) => (index % 480 < 60 ? top : value));
}

/**
 * What a check really reports of a small session with something wrong in most of its files, the
 * safe repairs taken. The measures come from the oracle, so no compiled module is needed.
 */
export async function checkSmallSession(
  rules: HouseRules,
): Promise<{ report: CheckReport; overviews: Uint8Array<ArrayBuffer> }> {
  const voice = sine(frames, 24, 31);
  const files = [
    wave('Lead Vocal_01.wav', [voice]),
    wave('bass di.wav', [clipped()]),
    wave('Gtr L.wav', [sine(frames, 24, 17)]),
    wave('Keys stereo.wav', [sine(frames, 24, 5), sine(frames, 24, 5)]),
    wave('short perc.wav', [sine(frames / 2, 24, 7)]),
    wave('nothing.wav', [Array<number>(frames).fill(0)]),
  ].sort((a, b) => (a.path < b.path ? -1 : 1));
  const measureFile = measureHere(await createOracle());
  const information = { ...emptySessionInformation(), artist: 'Velvet Tramline' };
  const input = { files, rules, information, measureFile };
  const check = await checkSession(input);
  const findings = [
    ...check.judgement.files.flatMap((file) => file.findings),
    ...check.judgement.session.findings,
  ];
  const repaired = await repairSession(input, check, safeRepairs(findings));
  const report = await buildReport({ check, repaired, rules, information, engine: 'oracle' });
  const pictures = new Map<string, Overview>();
  for (const { path, overview } of check.files) if (overview) pictures.set(path, overview);
  return {
    // Through JSON, as it travels.
    report: JSON.parse(JSON.stringify(report)) as CheckReport,
    overviews: writeOverviews(pictures),
  };
}
