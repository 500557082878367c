type FigureProps = {
  /** A finished number; a hyphen in front becomes a minus sign. */
  value: string | number;
  /** dBFS, Hz, bit, s ... kept on the same line as its number. */
  unit?: string;
  className?: string;
};

/** A measured number with its unit, in Plex Mono. */
export function Figure({ value, unit, className = '' }: FigureProps) {
  return (
    <span className={`figures whitespace-nowrap ${className}`}>
      {String(value).replace(/^-/, '−')}
      {unit !== undefined && <span className="text-[0.875em] text-ink-2">{` ${unit}`}</span>}
    </span>
  );
}

/** A row of figures under a title: "112 BPM   48 kHz   24 bit". */
export function Figures({ items }: { items: readonly string[] }) {
  return (
    <p className="figures flex flex-wrap gap-x-5 gap-y-1 text-small text-ink-2">
      {items.map((item) => (
        <span key={item}>{item}</span>
      ))}
    </p>
  );
}
