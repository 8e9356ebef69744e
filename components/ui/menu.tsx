'use client';

import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';

type Entry = { key: string; label: ReactNode; disabled?: boolean };
/** An entry does something, or brings a file. */
export type MenuItem = Entry & ({ onSelect: () => void } | { downloadHref: string });

const ITEM = 'flex cursor-pointer items-center gap-2 rounded px-3 py-2 text-ink no-underline outline-none data-[highlighted]:bg-wash data-[disabled]:text-ink-3 tap';

type MenuProps = { trigger: ReactNode; items: readonly MenuItem[]; label?: string; /** Stands above the entries. */ heading?: string; align?: 'start' | 'end' };

export function Menu({ trigger, items, label, heading, align = 'start' }: MenuProps) {
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger asChild aria-label={label}>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align={align} sideOffset={6} collisionPadding={8} className="appear z-50 min-w-52 rounded border border-rule bg-sheet p-1 shadow-lg">
          {heading ? <DropdownMenu.Label className="border-b border-rule px-3 py-2 text-small text-ink-3">{heading}</DropdownMenu.Label> : null}
          {items.map((item) => (
            <DropdownMenu.Item key={item.key} disabled={item.disabled} onSelect={'onSelect' in item ? item.onSelect : undefined} className={ITEM} asChild={'downloadHref' in item}>
              {'downloadHref' in item ? <a href={item.downloadHref} download>{item.label}</a> : item.label}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
