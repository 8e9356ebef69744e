'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import type { Role } from '@/policies/ability';
import { AccountMenu, type Hats } from './account-menu';
import { Wordmark } from './mark';
import { activeSection, SECTIONS } from './sections';

type RailProps = { role: Role; schoolName: string; termLine: string | null; personName: string; hats: Hats };

/** The list of sections is a stave: one rule per section, and the notehead sits on the one you are in. */
export function Rail({ role, schoolName, termLine, personName, hats }: RailProps) {
  const sections = SECTIONS[role];
  const active = activeSection(sections, usePathname());
  return (
    <div className="no-print sticky top-0 hidden h-dvh flex-col gap-[22px] overflow-y-auto border-r border-rule bg-paper py-5 md:flex">
      <Link href="/" className="px-[18px] no-underline" aria-label="Rungwell, first page"><Wordmark /></Link>
      <nav aria-label="Sections">
        <ul>
          {sections.map(({ href, label }, index) => {
            const isOn = active?.href === href;
            return (
              <li key={href} className={`relative border-b border-rule ${index === 0 ? 'border-t' : ''}`}>
                <Link href={href} aria-current={isOn ? 'page' : undefined} className={`flex h-[37px] items-center px-[18px] no-underline hover:bg-wash ${isOn ? 'font-bold text-ink' : 'font-[550] text-ink-2'}`}>
                  {label}
                </Link>
                {isOn ? <span aria-hidden className="absolute -bottom-[6px] right-4 h-3 w-[17px] rotate-[-20deg] rounded-[50%] bg-brass-fill" /> : null}
              </li>
            );
          })}
        </ul>
      </nav>
      <div className="mt-auto px-[18px] text-small text-ink-3">
        <p className="font-semibold text-ink">{schoolName}</p>
        {termLine ? <p>{termLine}</p> : null}
        <AccountMenu personName={personName} role={role} hats={hats} />
      </div>
    </div>
  );
}
