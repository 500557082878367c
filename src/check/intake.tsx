import { useEffect, useRef, useState, type ReactNode } from 'react';
import { readPicked } from '../browser/dropped-files.ts';
import {
  hasFolderPicker,
  pickFolder,
  readDropAndHold,
  type HeldFolder,
} from '../browser/folder-handle.ts';
import { Button, type ButtonKind } from '../ui/button.tsx';

type IntakeProps = {
  onFolder: (folder: HeldFolder) => void;
  onFailure: (failure: unknown) => void;
  onSample: () => void;
  children?: ReactNode;
};

/** The empty bench: a sheet that waits for a folder, with buttons beside the drop. */
export function Intake({ onFolder, onFailure, onSample, children }: IntakeProps) {
  const dragging = usePageDrop(onFolder, onFailure);
  return (
    <div
      className={`flex flex-col items-center gap-5 rounded-panel border-2 border-dashed px-6 py-14 text-center ${
        dragging ? 'border-case bg-wash' : 'border-edge bg-sheet'
      }`}
    >
      <p className="text-section">
        {dragging ? 'Let go, and the check begins' : 'Drop the exported folder here'}
      </p>
      <p className="max-w-prose text-ink-2">
        The whole folder, as your recording program exported it. Every file is measured here, in
        your browser: nothing is uploaded.
      </p>
      <Pickers onFolder={onFolder} onFailure={onFailure} />
      <p className="text-small text-ink-2">
        No session at hand?{' '}
        <button type="button" className="text-link py-1" onClick={onSample}>
          Try it with a sample
        </button>
        : fourteen faulty little files, made on the spot.
      </p>
      <div className="w-full max-w-2xl border-t border-line pt-5">{children}</div>
    </div>
  );
}

type PickerProps = Pick<IntakeProps, 'onFolder' | 'onFailure'>;

/** The buttons beside every drop. */
export function Pickers({ quiet = false, ...props }: PickerProps & { quiet?: boolean }) {
  const { onFolder } = props;
  const files = useRef<HTMLInputElement>(null);
  return (
    <div className="flex flex-wrap justify-center gap-3">
      <FolderButton kind={quiet ? 'plain' : 'primary'} {...props}>
        Choose a folder
      </FolderButton>
      <Button onClick={() => files.current?.click()}>Choose files</Button>
      <input
        ref={files}
        type="file"
        hidden
        multiple
        aria-label="Files to check"
        onChange={(event) => takePicked(event.currentTarget, onFolder)}
      />
    </div>
  );
}

/**
 * Opens the folder picker whose folder can be read again later; where there is none, the one that
 * every browser has.
 */
export function FolderButton({
  onFolder,
  onFailure,
  kind,
  children,
}: PickerProps & { kind: ButtonKind; children: ReactNode }) {
  const folder = useRef<HTMLInputElement>(null);
  const pick = (): void => {
    if (!hasFolderPicker()) {
      folder.current?.click();
      return;
    }
    pickFolder().then((picked) => picked && onFolder(picked), onFailure);
  };
  return (
    <>
      <Button kind={kind} onClick={pick}>
        {children}
      </Button>
      <input
        ref={folder}
        type="file"
        hidden
        webkitdirectory=""
        aria-label="Folder to check"
        onChange={(event) => takePicked(event.currentTarget, onFolder)}
      />
    </>
  );
}

function takePicked(input: HTMLInputElement, onFolder: IntakeProps['onFolder']): void {
  if (input.files && input.files.length > 0) {
    onFolder({ ...readPicked(input.files), handle: null });
  }
  // The same folder can be picked again after it was exported anew.
  input.value = '';
}

/** Takes drops anywhere on the page; true while files hang over it. */
export function usePageDrop(
  onFolder: IntakeProps['onFolder'],
  onFailure: IntakeProps['onFailure'],
): boolean {
  const [dragging, setDragging] = useState(false);
  useEffect(() => {
    const over = (event: DragEvent): void => {
      if (!event.dataTransfer?.types.includes('Files')) return;
      event.preventDefault();
      event.dataTransfer.dropEffect = 'copy';
      setDragging(true);
    };
    const leave = (event: DragEvent): void => {
      // Leaving one element enters another; only leaving the page has no related target.
      if (event.relatedTarget === null) setDragging(false);
    };
    const drop = (event: DragEvent): void => {
      if (!event.dataTransfer?.types.includes('Files')) return;
      event.preventDefault();
      setDragging(false);
      readDropAndHold(event.dataTransfer).then(onFolder, onFailure);
    };
    addEventListener('dragover', over);
    addEventListener('dragleave', leave);
    addEventListener('drop', drop);
    return () => {
      removeEventListener('dragover', over);
      removeEventListener('dragleave', leave);
      removeEventListener('drop', drop);
    };
  }, [onFolder, onFailure]);
  return dragging;
}
