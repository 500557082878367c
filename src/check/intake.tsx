import { useEffect, useRef, useState, type ReactNode } from 'react';
import { readDrop, readPicked, type DroppedFolder } from '../browser/dropped-files.ts';
import { Button } from '../ui/button.tsx';

type IntakeProps = {
  onFolder: (folder: DroppedFolder) => void;
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
      <Pickers onFolder={onFolder} />
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

/** The buttons beside every drop. */
export function Pickers({
  onFolder,
  quiet = false,
}: Pick<IntakeProps, 'onFolder'> & { quiet?: boolean }) {
  const folder = useRef<HTMLInputElement>(null);
  const files = useRef<HTMLInputElement>(null);
  const picked = (input: HTMLInputElement): void => {
    if (input.files && input.files.length > 0) onFolder(readPicked(input.files));
    // The same folder can be picked again after it was exported anew.
    input.value = '';
  };
  return (
    <div className="flex flex-wrap justify-center gap-3">
      <Button kind={quiet ? 'plain' : 'primary'} onClick={() => folder.current?.click()}>
        Choose a folder
      </Button>
      <Button onClick={() => files.current?.click()}>Choose files</Button>
      <input
        ref={folder}
        type="file"
        hidden
        webkitdirectory=""
        aria-label="Folder to check"
        onChange={(event) => picked(event.currentTarget)}
      />
      <input
        ref={files}
        type="file"
        hidden
        multiple
        aria-label="Files to check"
        onChange={(event) => picked(event.currentTarget)}
      />
    </div>
  );
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
      readDrop(event.dataTransfer).then(onFolder, onFailure);
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
