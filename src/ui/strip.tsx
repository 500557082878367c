import type { ReactNode } from 'react';
import { TapeLabel } from './tape-label.tsx';

type StripSheetProps = {
  /** Draw the common end as a line too. */
  endLine?: boolean;
  children: ReactNode;
  className?: string;
};

/** The sheet that strips hang on. Put an optional StripRuler first, then Strips. */
export function StripSheet({ endLine = false, children, className = '' }: StripSheetProps) {
  return (
    <div className={`strip-sheet ${className}`} data-end-line={endLine ? '' : undefined}>
      {children}
    </div>
  );
}

export type RulerMark = {
  /** Place along the lane, 0 (start) to 1 (end). */
  at: number;
  /** The bar number. */
  label: string;
  /** The time, such as "0:25". */
  time?: string;
};

/** Bars and time above the lanes, from the same left edge as every lane. */
export function StripRuler({ marks }: { marks: readonly RulerMark[] }) {
  return (
    <div className="strip-ruler" aria-hidden="true">
      <span />
      <div className="strip-ruler-lane">
        {marks.map((mark) => (
          <span
            key={mark.at}
            className="figures absolute bottom-1 text-micro whitespace-nowrap"
            style={{
              insetInlineStart: `${String(mark.at * 100)}%`,
              translate: mark.at >= 1 ? '-100%' : undefined,
            }}
          >
            <span className="font-medium text-ink">{mark.label}</span>
            {mark.time !== undefined && <span className="ml-1.5 text-ink-2">{mark.time}</span>}
          </span>
        ))}
      </div>
    </div>
  );
}

type StripProps = {
  /** The name on the tape. */
  name: string;
  /** A quieter second line, such as the file's own name. */
  detail?: ReactNode;
  /** The lane: a picture, a canvas, marks. It is positioned, so children may be absolute. */
  children?: ReactNode;
  className?: string;
};

/** One lashed track strip: tape label, start line, lane. */
export function Strip({ name, detail, children, className = '' }: StripProps) {
  return (
    <div className={`strip ${className}`}>
      <div className="strip-label">
        <TapeLabel name={name} />
        {detail !== undefined && (
          <span className="max-w-full truncate pl-0.5 text-micro text-ink-2">{detail}</span>
        )}
      </div>
      <div className="strip-lane">{children}</div>
    </div>
  );
}
