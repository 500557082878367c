import { access, constants, readFile, realpath, stat } from 'node:fs/promises';
import { dirname, resolve } from 'node:path';
import { checkSession, packSession, repairSession, type CheckInput } from '#shared/check.ts';
import { AppError } from '#shared/errors.ts';
import { allFindings } from '#shared/judge/all-findings.ts';
import { safeRepairs, unaskedRepairs } from '#shared/repair/choose-repairs.ts';
import { buildReport } from '#shared/report/build-report.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { writeReport } from '#shared/report/fit-report.ts';
import type { HouseRules } from '#shared/rules/house-rules.ts';
import { parseHouseRulesText } from '#shared/rules/parse-house-rules.ts';
import { defaultRules } from '#shared/rules/starter-sets.ts';
import { measureHere } from '#shared/session/measure-file.ts';
import {
  emptySessionInformation,
  type SessionInformation,
} from '#shared/session/session-information.ts';
import type { CheckArguments } from './check-arguments.ts';
import { loadMeters } from './load-meters.ts';
import { loadSheetFont } from './load-sheet-font.ts';
import { nodeChecksums } from './node-checksums.ts';
import { progressLine } from './progress-line.ts';
import { readIntake, type Intake } from './read-intake.ts';
import { reportTable } from './report-table.ts';
import { printable, sayError } from './say-error.ts';
import { removeHalfWritten, writePackage } from './write-package.ts';

/** Exit codes. */
const nothingToFix = 0;
const mustFixLeft = 1;
const couldNotRun = 2;

/** Runs the command; answers its exit code. Only bugs are thrown. */
export async function runCheck(args: CheckArguments): Promise<number> {
  const abort = new AbortController();
  const progress = progressLine(process.stderr);
  stopOnSignals(abort);
  try {
    const { report, problems } = await checkAndPack(args, abort.signal, progress);
    progress.clear();
    for (const { path, reason } of problems) {
      process.stderr.write(`${printable(path)} was not taken in: ${reason}.\n`);
    }
    process.stdout.write(
      args.json
        ? writeReport(report)
        : reportTable(report, { repaired: args.repairSafe, savedTo: args.out }),
    );
    return report.verdict === 'must-fix' ? mustFixLeft : nothingToFix;
  } catch (error) {
    progress.clear();
    if (error instanceof AppError) process.stderr.write(`${sayError(error)}\n`);
    else if (error instanceof RulesProblem) process.stderr.write(`${error.message}\n`);
    else throw error;
    return couldNotRun;
  }
}

/** Stopped from outside: what is half written goes, then the signal does what it always does. */
function stopOnSignals(abort: AbortController): void {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.once(signal, () => {
      abort.abort(new AppError('cancelled'));
      removeHalfWritten();
      process.kill(process.pid, signal);
    });
  }
}

type Progress = ReturnType<typeof progressLine>;

async function checkAndPack(
  args: CheckArguments,
  signal: AbortSignal,
  progress: Progress,
): Promise<{ report: CheckReport; problems: Intake['problems'] }> {
  const rules = await readRules(args.rules);
  const intake = await readIntake(args.target, args.roughMix, args.out, signal);
  if (args.out !== null) await examineTarget(args.out, intake);
  const information = sayInformation(args, intake);
  const engine = await loadMeters();
  const input: CheckInput = {
    files: intake.files,
    rules,
    information,
    measureFile: measureHere(engine),
  };
  const watch = (what: string) => ({
    signal,
    onProgress: ({ path, bytesDone, bytes }: { path: string; bytesDone: number; bytes: number }) =>
      progress.show(what, bytesDone, bytes, path),
  });

  const check = await checkSession(input, watch('Checking'));
  if (check.files.every(({ reading }) => reading.kind === 'not-audio')) {
    throw new AppError('nothing-to-check', { path: args.target });
  }
  const findings = allFindings(check.judgement);
  const chosen = args.repairSafe ? safeRepairs(findings) : unaskedRepairs(findings);
  const repaired = await repairSession(input, check, chosen, watch('Repairing'));
  const report = await buildReport({
    check,
    repaired,
    rules,
    information,
    engine: engine.name,
  });
  if (args.out !== null) {
    const pack = await packSession({
      files: input.files,
      check,
      repaired,
      report,
      trackSheet: await drawSheet(report),
      checksums: nodeChecksums,
      signal,
    });
    const { out } = args;
    await writePackage(
      out,
      pack,
      (bytes) => progress.show('Writing', bytes, pack.bytes, out),
      signal,
    );
  }
  return { report, problems: intake.problems };
}

/** Loaded late: the PDF library takes longer to load than a small session to check. */
async function drawSheet(report: CheckReport): Promise<Uint8Array> {
  const { drawTrackSheet } = await import('#shared/pack/track-sheet/draw-track-sheet.ts');
  return drawTrackSheet(report, loadSheetFont);
}

/** The rules file has mistakes; the message names each with its place. */
class RulesProblem extends Error {}

async function readRules(path: string | null): Promise<HouseRules> {
  if (path === null) return defaultRules;
  const text = await readFile(path, 'utf8').catch((error: unknown) => {
    throw new AppError('no-access', { path, reason: (error as { code?: string }).code ?? null });
  });
  const parsed = parseHouseRulesText(text);
  if ('rules' in parsed) return parsed.rules;
  const issues = parsed.issues.map(
    (issue) => `  ${issue.path === '' ? 'The file' : issue.path} ${issue.message}`,
  );
  throw new RulesProblem(
    [`${printable(path)} holds no house rules that can be used:`, ...issues].join('\n'),
  );
}

/** Said before the check, not after it: where nothing can be written, or only over a checked file. */
async function examineTarget(out: string, { files, root }: Intake): Promise<void> {
  const target = resolve(out);
  const folder = dirname(target);
  await access(folder, constants.W_OK).catch((error: unknown) => {
    throw new AppError('no-access', { path: folder, reason: (error as { code?: string }).code });
  });
  const info = await stat(target).catch(() => null);
  if (info?.isDirectory()) throw new AppError('no-access', { path: out, reason: 'EISDIR' });
  const place = info ? await realpath(target) : target;
  if (place === root || files.some(({ path }) => resolve(root, path) === place)) {
    throw new AppError('already-taken', { field: 'out', path: out });
  }
}

function sayInformation(args: CheckArguments, { roughMix }: Intake): SessionInformation {
  const { artist, title, tempo } = args;
  return {
    ...emptySessionInformation(),
    artist,
    title,
    tempo:
      tempo === null
        ? null
        : tempo === 'none'
          ? { kind: 'no-click' }
          : { kind: 'fixed', bpm: tempo },
    roles: roughMix === null ? {} : { [roughMix]: 'rough-mix' },
  };
}
