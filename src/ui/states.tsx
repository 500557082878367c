import type { ReactNode } from 'react';
import { LevelIcon } from './level-mark.tsx';

type EmptyStateProps = {
  title: string;
  /** What will be here, and what brings it. */
  children?: ReactNode;
  action?: ReactNode;
};

/** Nothing here yet: an empty sheet with its start line drawn, waiting for strips. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-start gap-4 px-5 py-8 sm:flex-row sm:items-center sm:gap-8 sm:px-6">
      <svg
        viewBox="0 0 132 72"
        width="132"
        height="72"
        aria-hidden="true"
        className="shrink-0 text-edge"
      >
        <g fill="none" stroke="currentColor" strokeDasharray="3 4">
          <path d="M34 14.5H130M34 36.5H130M34 58.5H130" />
          <rect x="0.5" y="7.5" width="24" height="14" />
          <rect x="0.5" y="29.5" width="24" height="14" />
          <rect x="0.5" y="51.5" width="24" height="14" />
        </g>
        <path d="M34 2V70" stroke="var(--case)" strokeWidth="2" />
        <g fill="var(--case)">
          <rect x="30" y="9" width="8" height="11" rx="2" />
          <rect x="30" y="31" width="8" height="11" rx="2" />
          <rect x="30" y="53" width="8" height="11" rx="2" />
        </g>
      </svg>
      <div className="max-w-prose">
        <p className="font-semibold">{title}</p>
        {children !== undefined && <div className="mt-1 text-ink-2">{children}</div>}
        {action !== undefined && <div className="mt-4 flex flex-wrap gap-2">{action}</div>}
      </div>
    </div>
  );
}

/** A grey bar where a line will be. */
export function Skeleton({ className = '' }: { className?: string }) {
  return (
    <div aria-hidden="true" className={`h-4 animate-pulse rounded-slight bg-well ${className}`} />
  );
}

type LoadingStateProps = { words?: string; lines?: number };

/** Loading, said in words for screen readers and shown as grey lines. */
export function LoadingState({ words = 'Loading…', lines = 3 }: LoadingStateProps) {
  return (
    <div role="status" className="flex flex-col gap-4 py-2">
      <span className="sr-only">{words}</span>
      {Array.from({ length: lines }, (_, line) => (
        <Skeleton key={line} className={['w-2/5', 'w-3/4', 'w-1/2'][line % 3] ?? ''} />
      ))}
    </div>
  );
}

type ErrorNoticeProps = {
  /** What went wrong, as a sentence. */
  title: ReactNode;
  /** What can be done about it. */
  children?: ReactNode;
  /** The server's request id, to quote when asking for help. */
  requestId?: string | undefined;
  action?: ReactNode;
};

/** Something failed and the person should know; announced at once. */
export function ErrorNotice({ title, children, requestId, action }: ErrorNoticeProps) {
  return (
    <div
      role="alert"
      className="flex gap-3 rounded border border-must/40 bg-must-wash px-4 py-3 text-ink"
    >
      <LevelIcon level="must-fix" className="mt-1" />
      <div className="min-w-0">
        <p className="font-medium">{title}</p>
        {children !== undefined && <div className="text-small text-ink-2">{children}</div>}
        {requestId !== undefined && (
          <p className="mt-1 text-small text-ink-2">
            Request <span className="figures wrap-anywhere">{requestId}</span>
          </p>
        )}
        {action !== undefined && <div className="mt-3 flex flex-wrap gap-2">{action}</div>}
      </div>
    </div>
  );
}

/** Something worth knowing that is no failure. */
export function Notice({ children }: { children: ReactNode }) {
  return (
    <div className="flex gap-3 rounded border border-note/35 bg-note-wash px-4 py-3 text-ink">
      <LevelIcon level="note" className="mt-1" />
      <div className="min-w-0">{children}</div>
    </div>
  );
}

/** Something worked; announced politely. */
export function DoneNotice({ children }: { children: ReactNode }) {
  return (
    <div
      role="status"
      className="flex gap-3 rounded border border-case/40 bg-wash px-4 py-3 text-ink"
    >
      <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true" className="mt-1 shrink-0">
        <path d="M2.5 8.5 6.5 12.5 13.5 4" fill="none" stroke="var(--case)" strokeWidth="2.25" />
      </svg>
      <div className="min-w-0">{children}</div>
    </div>
  );
}
