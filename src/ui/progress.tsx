import type { ReactNode } from 'react';

type ProgressProps = {
  /** What is being done, for screen readers. */
  label: string;
  /** Done so far, 0 to 1; undefined while nobody knows. */
  value: number | undefined;
  /** Words under the bar: "14 of 40 files, 12 s left". */
  children?: ReactNode;
};

/** How far the work is. */
export function Progress({ label, value, children }: ProgressProps) {
  const percent =
    value === undefined ? undefined : Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
        className="h-2 overflow-hidden rounded-slight bg-well shadow-[inset_0_0_0_1px_var(--edge)]"
      >
        {percent === undefined ? (
          <div className="h-full w-1/3 bg-case [animation:progress-drift_1.6s_ease-in-out_infinite]" />
        ) : (
          <div
            className="h-full bg-case transition-[width] duration-200"
            style={{ width: `${String(percent)}%` }}
          />
        )}
      </div>
      {children !== undefined && (
        <div className="figures mt-2 text-small text-ink-2">{children}</div>
      )}
    </div>
  );
}
