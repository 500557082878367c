import { Button } from '../ui/button.tsx';
import type { Bench } from './bench.ts';
import { FolderButton } from './intake.tsx';

type ExportedAgainProps = {
  bench: Bench;
  /** Whether the folder can be read without being picked once more. */
  canReadAgain: boolean;
};

/** Reads the folder again, of which only what changed is measured. */
export function ExportedAgain({ bench, canReadAgain }: ExportedAgainProps) {
  const words = 'I exported again';
  if (canReadAgain) return <Button onClick={() => bench.exportedAgain(null)}>{words}</Button>;
  return (
    <FolderButton kind="plain" onFolder={bench.exportedAgain} onFailure={bench.fail}>
      {words}
    </FolderButton>
  );
}
