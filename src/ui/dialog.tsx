import { AlertDialog as AlertParts, Dialog as Parts } from 'radix-ui';
import { useRef, type ReactNode } from 'react';
import { Button, type ButtonKind } from './button.tsx';

type DialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** One sentence under the title, read out when the dialog opens. */
  description?: ReactNode;
  /** Buttons in the lower right corner. */
  actions?: ReactNode;
  wide?: boolean;
  children?: ReactNode;
};

const titleClass = 'text-heading font-semibold';
const actionsClass =
  'flex flex-wrap justify-end gap-2 border-t border-line px-5 py-4 sm:px-6 max-sm:flex-col-reverse';

/**
 * Our dialogs are opened by state and not by a trigger of the library, which then would leave
 * the focus nowhere: whatever had it at the opening gets it back.
 */
function useFocusReturn() {
  const opener = useRef<Element | null>(null);
  return {
    onOpenAutoFocus: () => {
      opener.current = document.activeElement;
    },
    onCloseAutoFocus: (event: Event) => {
      event.preventDefault();
      if (opener.current instanceof HTMLElement) opener.current.focus();
    },
  };
}

/** Something to do before going on. Escape, the cross and a press outside close it. */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  actions,
  wide = false,
  children,
}: DialogProps) {
  const focusReturn = useFocusReturn();
  return (
    <Parts.Root open={open} onOpenChange={onOpenChange}>
      <Parts.Portal>
        <Parts.Overlay className="overlay-veil" />
        <Parts.Content
          {...focusReturn}
          className="overlay-card"
          data-wide={wide ? '' : undefined}
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
        >
          <header className="flex items-start gap-4 px-5 pt-5 sm:px-6">
            <div className="min-w-0 grow">
              <Parts.Title className={titleClass}>{title}</Parts.Title>
              {description !== undefined && (
                <Parts.Description className="mt-1 text-ink-2">{description}</Parts.Description>
              )}
            </div>
            <Parts.Close
              aria-label="Close"
              className="-mt-1 -mr-2 grid size-9 shrink-0 place-items-center rounded text-ink-2 hover:bg-wash hover:text-ink"
            >
              <svg viewBox="0 0 16 16" width="14" height="14" aria-hidden="true">
                <path d="m3 3 10 10M13 3 3 13" stroke="currentColor" strokeWidth="1.75" />
              </svg>
            </Parts.Close>
          </header>
          <div className="min-h-0 grow overflow-y-auto px-5 py-5 sm:px-6">{children}</div>
          {actions !== undefined && <footer className={actionsClass}>{actions}</footer>}
        </Parts.Content>
      </Parts.Portal>
    </Parts.Root>
  );
}

type AlertDialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** What will happen, and whether it can be taken back. */
  description: ReactNode;
  /** Says what happens: "Leave the file out", never "OK". */
  confirmWords: string;
  cancelWords?: string;
  kind?: ButtonKind;
  busy?: boolean;
  onConfirm: () => void;
};

/** A question before something that cannot be undone. Focus starts on the harmless answer. */
export function AlertDialog({
  open,
  onOpenChange,
  title,
  description,
  confirmWords,
  cancelWords = 'Keep it as it is',
  kind = 'danger',
  busy = false,
  onConfirm,
}: AlertDialogProps) {
  const focusReturn = useFocusReturn();
  return (
    <AlertParts.Root open={open} onOpenChange={onOpenChange}>
      <AlertParts.Portal>
        <AlertParts.Overlay className="overlay-veil" />
        <AlertParts.Content {...focusReturn} className="overlay-card">
          <div className="px-5 pt-5 pb-5 sm:px-6">
            <AlertParts.Title className={titleClass}>{title}</AlertParts.Title>
            <AlertParts.Description className="mt-2 text-ink-2">
              {description}
            </AlertParts.Description>
          </div>
          <footer className={actionsClass}>
            <AlertParts.Cancel asChild>
              <Button>{cancelWords}</Button>
            </AlertParts.Cancel>
            <Button kind={kind} busy={busy} onClick={onConfirm}>
              {confirmWords}
            </Button>
          </footer>
        </AlertParts.Content>
      </AlertParts.Portal>
    </AlertParts.Root>
  );
}
