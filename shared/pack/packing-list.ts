import type { DroppedFile } from '../bytes/byte-source.ts';
import { droppedTracks, renderPlanned } from '../repair/measure-entries.ts';
import type { RepairPlan } from '../repair/repair-plan.ts';
import type { CheckReport } from '../report/check-report.ts';
import { writeReport } from '../report/fit-report.ts';
import type { MeasuredFile } from '../session/measured-file.ts';
import type { ChecksumEngine } from './checksums.ts';
import { madeFile, type PackedFile } from './pack-entries.ts';
import { reportFileName, trackSheetFileName } from '../naming/safe-names.ts';

export type PackingInput = {
  plan: RepairPlan;
  /** Files as they were dropped, and what was measured of them. */
  files: readonly DroppedFile[];
  measured: readonly MeasuredFile[];
  /** What the plan's entries are, in its order. */
  packed: readonly MeasuredFile[];
  report: CheckReport;
  trackSheet: Uint8Array;
  checksums: ChecksumEngine;
  signal?: AbortSignal | undefined;
};

/**
 * Everything in the package but the list of checksums, each with length and CRC. What was
 * measured is known already; notes and other audio are read once for their CRC.
 */
export async function listPackedFiles(input: PackingInput): Promise<PackedFile[]> {
  const { plan, packed, checksums, signal } = input;
  const dropped = droppedTracks(input.files, input.measured);
  const files: PackedFile[] = [];
  for (const [index, entry] of plan.entries.entries()) {
    signal?.throwIfAborted();
    const file = (await renderPlanned(entry, dropped)) ?? dropped.files.get(entry.from[0] ?? '');
    if (!file) throw new Error(`${entry.to} comes from no dropped file`);
    const crc = packed[index]?.measures?.crc32;
    files.push({
      to: entry.to,
      from: entry.from,
      bytes: file.size,
      crc32: crc === undefined ? await crcOf(file, checksums, signal) : parseInt(crc, 16),
      open: () => file.open(),
    });
  }
  return [
    ...files,
    madeFile(trackSheetFileName, input.trackSheet, checksums),
    madeFile(reportFileName, writeReport(input.report), checksums),
  ];
}

async function crcOf(
  file: DroppedFile,
  checksums: ChecksumEngine,
  signal: AbortSignal | undefined,
): Promise<number> {
  const source = await file.open();
  try {
    let crc = 0;
    for await (const block of source.stream(0, signal)) crc = checksums.crc32(block, crc);
    return crc;
  } finally {
    await source.close();
  }
}
