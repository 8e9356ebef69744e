'use client';

import { Ellipsis } from 'lucide-react';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useState, type ReactNode } from 'react';
import type { Role } from '@/policies/ability';
import { Dialog } from '../ui/dialog';
import { Wordmark } from './mark';
import { activeSection, SECTIONS, type Section } from './sections';

export function PhoneTop({ aside }: { aside: ReactNode }) {
  return (
    <div className="no-print flex items-center justify-between gap-3 border-b border-rule bg-paper px-4 py-3 md:hidden">
      <Link href="/" className="no-underline" aria-label="Rungwell, first page"><Wordmark /></Link>
      <div className="text-small">{aside}</div>
    </div>
  );
}

const MOST = 5;

/** At most five entries; where there are more sections the fifth opens the rest. */
export function PhoneBottom({ role }: { role: Role }) {
  const [open, setOpen] = useState(false);
  const sections = SECTIONS[role];
  const active = activeSection(sections, usePathname());
  const fits = sections.length <= MOST;
  const shown = fits ? sections : sections.slice(0, MOST - 1);
  const rest = fits ? [] : sections.slice(MOST - 1);
  return (
    <nav aria-label="Sections" className="no-print fixed inset-x-0 bottom-0 z-30 border-t border-rule bg-paper pb-[env(safe-area-inset-bottom)] md:hidden">
      <ul className="flex">
        {shown.map((section) => <Entry key={section.href} section={section} isOn={active?.href === section.href} />)}
        {rest.length > 0 ? (
          <li className="flex-1">
            <button type="button" onClick={() => setOpen(true)} className={`relative flex h-[58px] w-full flex-col items-center justify-center gap-[2px] text-[11.5px] ${rest.some(({ href }) => href === active?.href) ? 'font-bold text-ink' : 'text-ink-2'}`}>
              <Ellipsis size={20} aria-hidden />More
            </button>
          </li>
        ) : null}
      </ul>
      <Dialog open={open} onOpenChange={setOpen} title="More">
        <ul>
          {rest.map(({ href, label, icon: Icon }) => (
            <li key={href} className="border-b border-rule last:border-b-0">
              <Link href={href} onClick={() => setOpen(false)} className="flex items-center gap-3 py-3 font-semibold text-ink no-underline"><Icon size={18} aria-hidden />{label}</Link>
            </li>
          ))}
        </ul>
      </Dialog>
    </nav>
  );
}

function Entry({ section: { href, label, icon: Icon }, isOn }: { section: Section; isOn: boolean }) {
  return (
    <li className="flex-1">
      <Link href={href} aria-current={isOn ? 'page' : undefined} className={`relative flex h-[58px] flex-col items-center justify-center gap-[2px] text-[11.5px] no-underline ${isOn ? 'font-bold text-ink' : 'text-ink-2'}`}>
        {isOn ? <span aria-hidden className="absolute -top-[5px] h-[10px] w-[14px] rotate-[-20deg] rounded-[50%] bg-brass-fill" /> : null}
        <Icon size={20} aria-hidden />
        {label}
      </Link>
    </li>
  );
}
