import { DropdownMenu as Parts } from 'radix-ui';
import type { ReactElement, ReactNode } from 'react';

type MenuProps = {
  /** The button that opens it; gets focus back afterwards. */
  trigger: ReactElement;
  align?: 'start' | 'end';
  children: ReactNode;
};

/** A short list of things to do. */
export function Menu({ trigger, align = 'end', children }: MenuProps) {
  return (
    // Not modal: the page stays readable behind it, and the focus is kept by the menu itself.
    <Parts.Root modal={false}>
      <Parts.Trigger asChild>{trigger}</Parts.Trigger>
      <Parts.Portal>
        <Parts.Content align={align} sideOffset={4} className="overlay-flyout min-w-48 p-1">
          {children}
        </Parts.Content>
      </Parts.Portal>
    </Parts.Root>
  );
}

type MenuItemProps = {
  onSelect: () => void;
  disabled?: boolean;
  /** Removes or undoes something. */
  danger?: boolean;
  children: ReactNode;
};

export function MenuItem({ onSelect, disabled = false, danger = false, children }: MenuItemProps) {
  return (
    <Parts.Item
      onSelect={onSelect}
      disabled={disabled}
      className={`overlay-item ${danger ? 'text-must' : ''}`}
    >
      {children}
    </Parts.Item>
  );
}

export function MenuSeparator() {
  return <Parts.Separator className="my-1 h-px bg-line" />;
}
