/** Four ways the tape may have been torn; the same name is always torn the same way. */
const tearCount = 4;

function tearOf(name: string): number {
  let sum = 0;
  for (const character of name) sum = (sum * 31 + (character.codePointAt(0) ?? 0)) >>> 0;
  return sum % tearCount;
}

type TapeLabelProps = {
  /** The name written on the tape: a track, a part, a zip. */
  name: string;
  size?: 'small' | 'medium' | 'large';
  /** Long names end in an ellipsis by default (the full name stays in the tooltip); or wrap. */
  wrap?: boolean;
  className?: string;
};

/** A strip of console tape with a name on it. */
export function TapeLabel({ name, size = 'medium', wrap = false, className = '' }: TapeLabelProps) {
  return (
    <span
      className={`tape ${className}`}
      data-tear={tearOf(name)}
      data-size={size}
      data-wrap={wrap ? '' : undefined}
    >
      <bdi className="tape-strip" title={wrap ? undefined : name}>
        {name}
      </bdi>
    </span>
  );
}
