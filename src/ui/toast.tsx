import type { CSSProperties } from 'react';
import { Toaster, toast } from 'sonner';

/** The library paints white cards of its own; these are its switches for our colours. */
const colours = {
  '--normal-bg': 'var(--sheet)',
  '--normal-text': 'var(--ink)',
  '--normal-border': 'var(--edge)',
  '--border-radius': '8px',
  fontFamily: 'inherit',
} as CSSProperties;

/**
 * Where short news appears ("Saved", "Link copied"). Anything a person must act on belongs on
 * the page, not here. Mount once, in the layout of the routes that use it.
 */
export function Toasts() {
  return <Toaster position="bottom-right" duration={6000} closeButton style={colours} />;
}

/** Says that something was done. */
export function toastDone(words: string): void {
  toast.success(words);
}

/** Says that something failed that leaves the page as it was. */
export function toastFailed(words: string): void {
  toast.error(words);
}
