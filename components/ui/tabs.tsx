'use client';

import { Tabs as Primitive } from 'radix-ui';
import type { ReactNode } from 'react';

export type Tab = { key: string; label: ReactNode; content: ReactNode };

/** Opens at the tab that was asked for, or at the first if there is none of that name. */
export function Tabs({ tabs, label, initial }: { tabs: readonly Tab[]; label: string; initial?: string }) {
  return (
    <Primitive.Root defaultValue={(tabs.find(({ key }) => key === initial) ?? tabs[0])?.key}>
      <Primitive.List aria-label={label} className="flex gap-1 overflow-x-auto border-b border-rule-strong">
        {tabs.map(({ key, label: text }) => (
          <Primitive.Trigger key={key} value={key} className="shrink-0 whitespace-nowrap border-b-2 border-transparent px-3 py-2 font-semibold text-ink-3 data-[state=active]:border-brass-fill data-[state=active]:text-ink tap">
            {text}
          </Primitive.Trigger>
        ))}
      </Primitive.List>
      {tabs.map(({ key, content }) => <Primitive.Content key={key} value={key} className="pt-4">{content}</Primitive.Content>)}
    </Primitive.Root>
  );
}
