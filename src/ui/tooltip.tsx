import { Tooltip as Parts } from 'radix-ui';
import type { ReactElement, ReactNode } from 'react';

type TooltipProps = {
  /** A few words; never the only place where something needed is said. */
  words: ReactNode;
  side?: 'top' | 'right' | 'bottom' | 'left';
  /** A focusable element. */
  children: ReactElement;
};

/** Words beside a control, on hover and on keyboard focus; Escape closes them. */
export function Tooltip({ words, side = 'top', children }: TooltipProps) {
  return (
    <Parts.Provider delayDuration={350}>
      <Parts.Root>
        <Parts.Trigger asChild>{children}</Parts.Trigger>
        <Parts.Portal>
          <Parts.Content
            side={side}
            sideOffset={6}
            collisionPadding={8}
            className="overlay-flyout max-w-72 px-3 py-1.5 text-small"
          >
            {words}
          </Parts.Content>
        </Parts.Portal>
      </Parts.Root>
    </Parts.Provider>
  );
}
