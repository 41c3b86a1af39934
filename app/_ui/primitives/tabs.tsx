'use client';
import { Tabs as Base } from '@base-ui/react/tabs';
import type { ReactNode } from 'react';

export interface TabItem {
  readonly id: string;
  readonly label: ReactNode;
  readonly content: ReactNode;
}

interface TabsProps {
  readonly label: string;
  readonly tabs: readonly TabItem[];
  readonly value?: string;
  readonly defaultValue?: string;
  readonly onChange?: (id: string) => void;
}

export function Tabs({ label, tabs, value, defaultValue, onChange }: TabsProps) {
  const steer = value === undefined ? { defaultValue: defaultValue ?? tabs[0]?.id } : { value };
  return (
    <Base.Root {...steer} onValueChange={(next) => onChange?.(String(next))}>
      <Base.List aria-label={label} className="flex flex-wrap gap-1 shadow-[inset_0_-1px_var(--hair-2)]">
        {tabs.map((tab) => (
          <Base.Tab key={tab.id} value={tab.id} className="min-h-9 px-3 py-2 text-ui text-ink-2 hover:text-ink data-active:font-semibold data-active:text-ink data-active:shadow-[inset_0_-2px_var(--link)]">
            {tab.label}
          </Base.Tab>
        ))}
      </Base.List>
      {tabs.map((tab) => <Base.Panel key={tab.id} value={tab.id} className="pt-4">{tab.content}</Base.Panel>)}
    </Base.Root>
  );
}
