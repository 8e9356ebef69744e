'use client';

import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';

export type MenuItem = { key: string; label: ReactNode; onSelect: () => void; disabled?: boolean };

export function Menu({ trigger, items, label }: { trigger: ReactNode; items: readonly MenuItem[]; label?: string }) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild aria-label={label}>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="start" sideOffset={6} className="appear z-50 min-w-52 rounded border border-rule bg-sheet p-1 shadow-lg">
          {items.map(({ key, label: text, onSelect, disabled }) => (
            <DropdownMenu.Item key={key} disabled={disabled} onSelect={onSelect} className="flex cursor-pointer items-center gap-2 rounded px-3 py-2 outline-none data-[highlighted]:bg-wash data-[disabled]:text-ink-3 tap">
              {text}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
