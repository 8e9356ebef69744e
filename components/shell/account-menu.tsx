'use client';

import { ChevronsUpDown, HardHat, LogOut, MonitorX } from 'lucide-react';
import { signOut } from 'next-auth/react';
import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import type { Role } from '@/policies/ability';
import { Menu, type MenuItem } from '../ui/menu';
import { homeOf, ROLE_WORDS } from './sections';

/** The hats a person may put on, and how to change them (a server action handed in by the layout). */
export type Hats = { roles: readonly Role[]; wear: (role: { role: Role }) => Promise<{ ok: boolean }>; endAll: (input: Record<string, never>) => Promise<{ ok: boolean }> };

export function AccountMenu({ personName, role, hats, compact = false }: { personName: string; role: Role; hats: Hats; compact?: boolean }) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  const wear = (next: Role) => startTransition(async () => {
    const { ok } = await hats.wear({ role: next });
    if (!ok) return;
    router.push(homeOf(next));
    router.refresh();
  });
  const others: MenuItem[] = hats.roles.filter((other) => other !== role)
    .map((other) => ({ key: other, label: <><HardHat size={16} aria-hidden />Go on as {ROLE_WORDS[other].toLowerCase()}</>, onSelect: () => wear(other) }));
  const leaveAll = () => startTransition(async () => {
    await hats.endAll({});
    await signOut({ callbackUrl: '/sign-in' });
  });
  const items: MenuItem[] = [...others, { key: 'all', label: <><MonitorX size={16} aria-hidden />Sign out everywhere</>, onSelect: leaveAll }, { key: 'out', label: <><LogOut size={16} aria-hidden />Sign out</>, onSelect: () => void signOut({ callbackUrl: '/sign-in' }) }];
  const trigger = (
    <button type="button" disabled={pending} className={`flex items-center justify-between gap-2 rounded text-left hover:bg-wash tap ${compact ? 'px-2 py-1' : 'mt-3 w-full border border-rule px-2 py-2'}`}>
      <span className="min-w-0"><span className="block truncate font-semibold text-ink">{personName}</span><span className="block text-ink-3">{ROLE_WORDS[role]}</span></span>
      <ChevronsUpDown size={15} aria-hidden />
    </button>
  );
  return <Menu trigger={trigger} items={items} label={`${personName}, ${ROLE_WORDS[role]}: account`} />;
}
