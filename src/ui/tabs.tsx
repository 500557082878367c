import { Tabs as Parts } from 'radix-ui';
import type { ReactNode } from 'react';

type Tab<Value extends string> = {
  value: Value;
  label: ReactNode;
  /** How many things lie behind it. */
  count?: number;
  content: ReactNode;
};

type TabsProps<Value extends string> = {
  label: string;
  tabs: readonly Tab<Value>[];
  value: Value;
  onChange: (value: Value) => void;
};

/** Views of one thing, side by side; arrow keys move between them. */
export function Tabs<Value extends string>({ label, tabs, value, onChange }: TabsProps<Value>) {
  return (
    <Parts.Root
      value={value}
      onValueChange={(chosen) => {
        onChange(chosen as Value);
      }}
    >
      <Parts.List aria-label={label} className="flex gap-1 overflow-x-auto border-b border-line">
        {tabs.map((tab) => (
          <Parts.Trigger
            key={tab.value}
            value={tab.value}
            className="-mb-px min-h-10 border-b-2 border-transparent px-3 text-[0.9375rem] font-medium whitespace-nowrap text-ink-2 hover:text-ink focus-visible:-outline-offset-2 data-[state=active]:border-case data-[state=active]:text-ink"
          >
            {tab.label}
            {tab.count !== undefined && (
              <>
                {' '}
                <span className="figures ml-1 text-small text-ink-2">{tab.count}</span>
              </>
            )}
          </Parts.Trigger>
        ))}
      </Parts.List>
      {tabs.map((tab) => (
        <Parts.Content key={tab.value} value={tab.value} className="pt-5">
          {tab.content}
        </Parts.Content>
      ))}
    </Parts.Root>
  );
}
