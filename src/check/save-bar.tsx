import { useRef, useState, type ReactNode } from 'react';
import { AppError } from '#shared/errors.ts';
import { describeFinding } from '#shared/findings/catalogue/describe-finding.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { CheckReport } from '#shared/report/check-report.ts';
import { ErrorPanel } from '../app/error-panel.tsx';
import { Button } from '../ui/button.tsx';
import { AlertDialog, Dialog } from '../ui/dialog.tsx';
import { Progress } from '../ui/progress.tsx';
import { TapeLabel } from '../ui/tape-label.tsx';
import type { PackOutput, PackProgress } from '../workers/session-api.ts';
import type { Bench } from './bench.ts';
import type { ZipVerification } from './bench-state.ts';
import { byteWords } from './byte-words.ts';
import { fileName } from './file-name.ts';
import { PackingList } from './packing-list.tsx';
import { hasSavePicker, pickZip, saveZip } from './save-zip.ts';
import { Verification } from './verification-words.tsx';
import { findingKey } from './viewed-session.ts';

type SaveBarProps = {
  bench: Bench;
  report: CheckReport;
  verification: ZipVerification | null;
  children?: ReactNode;
};

type Saving = { total: number; progress: PackProgress | null; abort: AbortController };

/** What is about to be saved, how far it is, and what came of it. */
export function SaveBar({ bench, report, verification, children }: SaveBarProps) {
  const [listShown, setListShown] = useState(false);
  const [saving, setSaving] = useState<Saving | null>(null);
  const [saved, setSaved] = useState<(PackOutput & { picked: boolean }) | null>(null);
  const [failure, setFailure] = useState<unknown>(null);
  const [asking, setAsking] = useState(false);
  const fileName = `${report.package.folderName}.zip`;
  const total = packedBytes(report);

  const mustFix = report.package.findings.filter(({ level }) => level === 'must-fix');

  const save = async (): Promise<void> => {
    setAsking(false);
    const handle = hasSavePicker() ? await pickZip(fileName) : null;
    if (hasSavePicker() && handle === null) return;
    const abort = new AbortController();
    setFailure(null);
    setSaved(null);
    setSaving({ total, progress: null, abort });
    try {
      const output = await saveZip(bench, handle, {
        signal: abort.signal,
        onProgress: (progress) => setSaving({ total, progress, abort }),
      });
      setSaved({ ...output, picked: handle !== null });
      if (!handle) bench.expectBack(fileName);
    } catch (cause) {
      if (!(cause instanceof AppError && cause.code === 'cancelled')) setFailure(cause);
    } finally {
      setSaving(null);
    }
  };

  return (
    <footer className="z-10 border-t sm:sticky sm:bottom-0 border-line bg-paper px-4 py-3 sm:px-7">
      {failure !== null && <ErrorPanel error={failure} />}
      {saving && <SavingProgress {...saving} />}
      {saved && (
        <p role="status" className="mb-2 text-small">
          {savedWords(saved)}
          {!saved.picked && <VerifyDownload bench={bench} />}
        </p>
      )}
      {verification && (
        <div className="mb-3">
          <Verification verification={verification} />
        </div>
      )}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <TapeLabel name={fileName} />
        <span className="figures text-small text-ink-2">
          {entryWords(report)}, {byteWords(total)}, checksums inside
        </span>
        <div className="ms-auto flex flex-wrap gap-2">
          {children}
          <Button onClick={() => setListShown(true)}>Packing list</Button>
          <Button
            kind="primary"
            busy={saving !== null}
            busyWords="Saving…"
            onClick={() => (mustFix.length > 0 ? setAsking(true) : void save())}
          >
            Save the zip
          </Button>
        </div>
      </div>
      <AlertDialog
        open={asking}
        onOpenChange={setAsking}
        title={
          mustFix.length === 1
            ? 'One thing still must be fixed'
            : `${String(mustFix.length)} things still must be fixed`
        }
        description={<MustFixList findings={mustFix} />}
        kind="primary"
        confirmWords="Save it all the same"
        cancelWords="Go back"
        onConfirm={() => void save()}
      />
      <Dialog
        wide
        open={listShown}
        onOpenChange={setListShown}
        title="Packing list"
        description="What goes into the zip, under which name. Change a name here, or say what a file is. Your files on disk stay as they are."
      >
        <PackingList report={report} onChange={bench.setInformation} />
      </Dialog>
    </footer>
  );
}

/** A page cannot read the downloads back by itself, so the person drops the zip, or picks it. */
function VerifyDownload({ bench }: { bench: Bench }) {
  const zip = useRef<HTMLInputElement>(null);
  return (
    <>
      {' '}
      To be sure it arrived whole, drop the zip here to verify it, or{' '}
      <button type="button" className="text-link py-1" onClick={() => zip.current?.click()}>
        choose it
      </button>
      .
      <input
        ref={zip}
        type="file"
        hidden
        accept=".zip"
        aria-label="Zip to verify"
        onChange={({ currentTarget }) => {
          const file = currentTarget.files?.[0];
          if (file) void bench.verify(file);
          currentTarget.value = '';
        }}
      />
    </>
  );
}

/** What is left, so that nobody sends it without knowing; the report says it too. */
function MustFixList({ findings }: { findings: readonly Finding[] }) {
  return (
    <>
      The engineer will see these in the report:{' '}
      {findings.map((finding) => {
        const names = finding.files.slice(0, 3).map(fileName).join(', ');
        const { title } = describeFinding(finding);
        return (
          <span key={findingKey(finding)} className="mt-1 block text-ink">
            {names === '' ? title : `${names}: ${title}`}
          </span>
        );
      })}
    </>
  );
}

function SavingProgress({ total, progress, abort }: Saving) {
  const verifying = progress?.step === 'verifying';
  return (
    <div className="mb-3 flex items-center gap-4">
      <div className="grow">
        <Progress label="Saving the zip" value={(progress?.bytes ?? 0) / Math.max(1, total)}>
          {verifying ? 'Reading it back' : 'Writing'}, {byteWords(progress?.bytes ?? 0)} of{' '}
          {byteWords(total)}
        </Progress>
      </div>
      <Button size="small" onClick={() => abort.abort()}>
        Cancel
      </Button>
    </div>
  );
}

function savedWords({ bytes, verified, picked }: PackOutput & { picked: boolean }): string {
  if (!picked) return `${byteWords(bytes)} handed to your downloads.`;
  return verified
    ? `Saved ${byteWords(bytes)}, read back from the disk and found the same.`
    : 'What is on the disk is not what was written. Save it again, to another disk if you can.';
}

/** Audio as it was checked; repairs change it by little, and the exact size shows while saving. */
function packedBytes(report: CheckReport): number {
  return report.package.entries.reduce((sum, { bytes }) => sum + bytes, 0);
}

function entryWords(report: CheckReport): string {
  const { length } = report.package.entries;
  return length === 1 ? '1 file' : `${String(length)} files`;
}
