import { ErrorNotice } from '../ui/states.tsx';
import { Button } from '../ui/button.tsx';
import { errorText, requestIdOf } from './error-text.ts';

type ErrorPanelProps = { error: unknown; onRetry?: () => void };

/** Something thrown, in words, with its request number and a way to try again. */
export function ErrorPanel({ error, onRetry }: ErrorPanelProps) {
  const { title, advice } = errorText(error);
  return (
    <ErrorNotice
      title={title}
      requestId={requestIdOf(error)}
      action={
        onRetry !== undefined && (
          <Button size="small" onClick={onRetry}>
            Try again
          </Button>
        )
      }
    >
      {advice}
    </ErrorNotice>
  );
}
