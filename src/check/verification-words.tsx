import type { PackageVerification } from '#shared/pack/verify-package.ts';
import { errorText } from '../app/error-text.ts';
import { Progress } from '../ui/progress.tsx';
import { DoneNotice, ErrorNotice, Notice } from '../ui/states.tsx';
import type { ZipVerification } from './bench-state.ts';
import { byteWords } from './byte-words.ts';

/** Names in a sentence are as many as one reads; the rest is counted. */
const mostNames = 5;

/** Whether a zip holds what was packed, in a sentence, or how far the reading is. */
export function Verification({ verification }: { verification: ZipVerification }) {
  const { fileName } = verification;
  if (verification.step === 'reading') {
    const { bytesRead, bytes } = verification;
    return (
      <Progress label="Verifying the zip" value={bytesRead / Math.max(1, bytes)}>
        Verifying {fileName}, {byteWords(bytesRead)} of {byteWords(bytes)}
      </Progress>
    );
  }
  if (verification.step === 'failed') {
    const { title, advice } = errorText(verification.failure);
    return (
      <ErrorNotice title={`${fileName} could not be verified. ${title}`}>{advice}</ErrorNotice>
    );
  }
  const { found } = verification;
  if (found === null) {
    return <Notice>{fileName} holds no list of checksums, so it cannot be verified.</Notice>;
  }
  const wrong = wrongWords(found);
  if (wrong.length === 0) {
    return <DoneNotice>{verifiedWords(found.same)}</DoneNotice>;
  }
  return (
    <ErrorNotice title={`${fileName} is not what was packed.`}>
      {wrong.map((sentence) => (
        <p key={sentence}>{sentence}</p>
      ))}
    </ErrorNotice>
  );
}

function verifiedWords(files: number): string {
  return files === 1
    ? 'Verified: the one file is what was packed.'
    : `Verified: all ${String(files)} files are what was packed.`;
}

/** A sentence for each kind of difference; none where everything is as it was packed. */
function wrongWords({ different, missing, unlisted, damagedLines }: PackageVerification): string[] {
  const sentences: string[] = [];
  if (different.length > 0) sentences.push(`Other bytes than were packed: ${named(different)}.`);
  if (missing.length > 0) sentences.push(`Packed, but no longer there: ${named(missing)}.`);
  if (unlisted.length > 0) sentences.push(`There, but never packed: ${named(unlisted)}.`);
  if (damagedLines > 0) sentences.push('The list of checksums itself is damaged.');
  return sentences;
}

function named(paths: readonly string[]): string {
  const more = paths.length - mostNames;
  const names = paths.slice(0, mostNames).join(', ');
  return more > 0 ? `${names} and ${String(more)} more` : names;
}
