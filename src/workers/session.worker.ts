import { judgeCheck, packSession, repairSession } from '#shared/check.ts';
import { emptyComparison } from '#shared/compare/comparison.ts';
import { createMeters } from '#shared/measure/create-meters.ts';
import { verifyPackage } from '#shared/pack/verify-package.ts';
import { drawTrackSheet } from '#shared/pack/track-sheet/draw-track-sheet.ts';
import type { Package } from '#shared/pack/pack-entries.ts';
import { droppedTracks, renderPlanned } from '#shared/repair/measure-entries.ts';
import { rememberRenders } from '#shared/repair/remember-renders.ts';
import { inPathOrder, type MeasuredFile } from '#shared/session/measured-file.ts';
import { readExcerpt } from '#shared/session/read-excerpt.ts';
import { withoutCommonFolder } from '#shared/session/common-folder.ts';
import { isJunk } from '#shared/session/junk-files.ts';
import { compareFiles } from '#shared/session/compare-files.ts';
import { measureHere, type MeasureFile } from '#shared/session/measure-file.ts';
import { writeToPickedFile } from '../browser/write-picked-file.ts';
import { loadChecksums } from '../browser/checksums.ts';
import { loadSheetFont } from '../browser/load-sheet-font.ts';
import { serveWorker } from './bridge.ts';
import { droppedFile, listZip, type FileToRead } from './file-to-read.ts';
import type { SessionApi } from './session-api.ts';
import { sendThroughPort } from './stream-port.ts';

let measureFile: MeasureFile | null = null;
let prepared: Package | null = null;
let previewed: MeasuredFile[] = [];

const dropped = (files: FileToRead[]) => files.map(droppedFile);

serveWorker<SessionApi>({
  load(module) {
    measureFile = rememberRenders(measureHere(createMeters(module)));
    return Promise.resolve(null);
  },
  async listZip(file) {
    const { files, problems } = await listZip(file);
    return { files: files.map(({ path, size }) => ({ path, size })), problems };
  },
  async verifyZip(file, { signal, report }) {
    const { files } = await listZip(file);
    let bytes = 0;
    let toldAt = 0;
    return verifyPackage(withoutCommonFolder(files, isJunk), await loadChecksums(), {
      signal,
      onBytes: (more) => {
        bytes += more;
        const now = performance.now();
        if (now - toldAt < 100) return;
        toldAt = now;
        report(bytes);
      },
    });
  },
  excerpt({ file, startFrame, frames }) {
    return readExcerpt(droppedFile(file), startFrame, frames);
  },
  async repairedExcerpt({ path, files, measured, plan, startFrame, frames }) {
    const entry = plan.entries.find(({ from }) => from.includes(path));
    const rendered = entry && (await renderPlanned(entry, droppedTracks(dropped(files), measured)));
    return rendered ? readExcerpt(rendered, startFrame, frames) : null;
  },
  preview({ fromStart, more, rules, information }) {
    previewed = inPathOrder([...(fromStart ? [] : previewed), ...more]);
    const session = { files: previewed, comparison: emptyComparison() };
    return Promise.resolve(judgeCheck(session, rules, information).judgement);
  },
  compare({ files, measured }, { signal }) {
    return compareFiles(measured, dropped(files), signal);
  },
  repair({ files, check, chosen, rules, information }, { signal }) {
    if (!measureFile) throw new Error('load comes before repair');
    const input = { files: dropped(files), rules, information, measureFile };
    return repairSession(input, check, chosen, { signal });
  },
  async prepare({ files, check, repaired, report }) {
    prepared = await packSession({
      files: dropped(files),
      check,
      repaired,
      report,
      trackSheet: await drawTrackSheet(report, loadSheetFont),
      checksums: await loadChecksums(),
    });
    return { fileName: prepared.fileName, bytes: prepared.bytes };
  },
  async pack(sink, { signal, report }) {
    if (!prepared) throw new Error('prepare comes before pack');
    if (sink.kind === 'picked-file') {
      return writeToPickedFile(sink.handle, prepared.stream(signal), signal, report);
    }
    let bytes = 0;
    await sendThroughPort(prepared.stream(signal), sink.port, (sent) =>
      report({ step: 'writing', bytes: (bytes += sent) }),
    );
    return { bytes, verified: null };
  },
});
