import type { ComponentProps, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router-dom';

export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'danger';
export type ButtonSize = 'small' | 'medium' | 'large';

const kindClass: Record<ButtonKind, string> = {
  primary: 'border-case bg-case text-on-case hover:border-case-deep hover:bg-case-deep',
  plain: 'border-edge bg-sheet text-ink hover:border-ink hover:bg-paper',
  quiet: 'border-transparent text-ink hover:bg-wash',
  danger: 'border-must bg-sheet text-must hover:bg-must hover:text-on-must',
};

const sizeClass: Record<ButtonSize, string> = {
  small: 'min-h-8 gap-1.5 px-3 text-small',
  medium: 'min-h-10 gap-2 px-4 text-[0.9375rem] leading-5',
  large: 'min-h-12 gap-2.5 px-5 text-body',
};

/** The classes of a button, for the rare element that is one but cannot be made by Button. */
export function buttonClass(kind: ButtonKind = 'plain', size: ButtonSize = 'medium'): string {
  return `inline-flex shrink-0 items-center justify-center rounded border py-1 text-center font-medium no-underline select-none transition-colors duration-100 aria-disabled:cursor-default aria-disabled:opacity-60 disabled:opacity-60 ${kindClass[kind]} ${sizeClass[size]}`;
}

type Look = { kind?: ButtonKind; size?: ButtonSize; className?: string };

type ButtonProps = Look &
  Omit<ComponentProps<'button'>, 'className'> & {
    /** Work is under way: the button keeps its focus but does nothing when pressed again. */
    busy?: boolean;
    /** What it says meanwhile, such as "Saving…"; otherwise its own words stay. */
    busyWords?: string;
    children: ReactNode;
  };

/** A button that says what happens. `type` is "button" unless a form says otherwise. */
export function Button({
  kind = 'plain',
  size = 'medium',
  busy = false,
  busyWords,
  type = 'button',
  className = '',
  onClick,
  children,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      className={`${buttonClass(kind, size)} ${className}`}
      aria-disabled={busy || rest['aria-disabled'] || undefined}
      aria-busy={busy || undefined}
      onClick={(event) => {
        if (busy) event.preventDefault();
        else onClick?.(event);
      }}
    >
      {busy && <Spinner />}
      {busy && busyWords !== undefined ? busyWords : children}
    </button>
  );
}

/** A link that looks like a button: it goes somewhere. */
export function ButtonLink({
  kind = 'plain',
  size = 'medium',
  className = '',
  children,
  ...rest
}: Look & Omit<LinkProps, 'className'>) {
  return (
    <Link {...rest} className={`${buttonClass(kind, size)} ${className}`}>
      {children}
    </Link>
  );
}

/** A turning reel; stands still for people who asked for less motion. */
export function Spinner() {
  return (
    <svg viewBox="0 0 16 16" width="16" height="16" aria-hidden="true" className="animate-spin">
      <circle
        cx="8"
        cy="8"
        r="6.25"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.5"
        opacity="0.35"
      />
      <path
        d="M8 1.75A6.25 6.25 0 0 1 14.25 8"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.75"
        strokeLinecap="round"
      />
    </svg>
  );
}
