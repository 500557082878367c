/** How urgent a finding is. Told by shape and word as well as by colour. */
export type Level = 'must-fix' | 'look' | 'note';

export const levelWords: Record<Level, string> = {
  'must-fix': 'must fix',
  look: 'look',
  note: 'note',
};

/** Text colour of each level, for words that stand beside the mark. */
export const levelTextClass: Record<Level, string> = {
  'must-fix': 'text-must',
  look: 'text-look',
  note: 'text-note',
};

/**
 * The outlines, on a 16 × 16 grid, for SVG and for canvas (`new Path2D(levelPaths.look)`), to
 * be filled with the even-odd rule: a luggage tag with its eyelet, an eye, a dot.
 */
export const levelPaths: Record<Level, string> = {
  'must-fix':
    'M6.2 2.6H13.4A1.6 1.6 0 0 1 15 4.2V11.8A1.6 1.6 0 0 1 13.4 13.4H6.2A1.6 1.6 0 0 1 4.95 12.8L1.35 8.6A0.95 0.95 0 0 1 1.35 7.4L4.95 3.2A1.6 1.6 0 0 1 6.2 2.6ZM6.3 6.5A1.5 1.5 0 1 0 6.3 9.5A1.5 1.5 0 1 0 6.3 6.5Z',
  look: 'M8 2.8C11.4 2.8 14 5 15.6 8C14 11 11.4 13.2 8 13.2C4.6 13.2 2 11 0.4 8C2 5 4.6 2.8 8 2.8ZM8 4.5C5.5 4.5 3.6 5.9 2.35 8C3.6 10.1 5.5 11.5 8 11.5C10.5 11.5 12.4 10.1 13.65 8C12.4 5.9 10.5 4.5 8 4.5ZM8 5.5A2.5 2.5 0 1 1 8 10.5A2.5 2.5 0 1 1 8 5.5Z',
  note: 'M8 4.2A3.8 3.8 0 1 1 8 11.8A3.8 3.8 0 1 1 8 4.2Z',
};

type LevelIconProps = {
  level: Level;
  sizePx?: number;
  /** A rim in the colour of the sheet, for marks that lie on a picture. */
  halo?: boolean;
  className?: string;
};

/** The shape alone; hidden from screen readers, so words must stand beside it. */
export function LevelIcon({ level, sizePx = 16, halo = false, className = '' }: LevelIconProps) {
  return (
    <svg
      viewBox="0 0 16 16"
      width={sizePx}
      height={sizePx}
      aria-hidden="true"
      className={`inline-block shrink-0 overflow-visible fill-current ${levelTextClass[level]} ${className}`}
    >
      {halo && (
        <path
          d={levelPaths[level]}
          className="stroke-sheet"
          strokeWidth="4"
          strokeLinejoin="round"
        />
      )}
      <path d={levelPaths[level]} fillRule="evenodd" />
    </svg>
  );
}

type LevelMarkProps = {
  level: Level;
  /** Other words than the level's own name, such as "2 to export again". */
  children?: React.ReactNode;
  className?: string;
};

/** Shape and word together. */
export function LevelMark({ level, children, className = '' }: LevelMarkProps) {
  return (
    <span
      className={`inline-flex items-center gap-2 font-medium ${levelTextClass[level]} ${className}`}
    >
      <LevelIcon level={level} />
      <span className="self-baseline">{children ?? levelWords[level]}</span>
    </span>
  );
}
