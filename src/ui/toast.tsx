import { Toaster, toast } from 'sonner';

/**
 * Where short news appears ("Saved", "Link copied"). Anything a person must act on belongs on
 * the page, not here. Mount once, in the layout of the routes that use it.
 */
export function Toasts() {
  return (
    <Toaster
      position="bottom-right"
      duration={6000}
      closeButton
      toastOptions={{ className: 'text-small' }}
    />
  );
}

/** Says that something was done. */
export function toastDone(words: string): void {
  toast.success(words);
}

/** Says that something failed that leaves the page as it was. */
export function toastFailed(words: string): void {
  toast.error(words);
}
