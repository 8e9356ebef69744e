import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { isFamilyRole } from '@/components/shell/sections';
import { requireContext } from '@/lib/server/context';
import { SignedInShell } from '../signed-in-shell';

export default async function StaffLayout({ children }: { children: ReactNode }) {
  const context = await requireContext();
  // Comfort, not a guard: every screen and operation checks for itself.
  if (isFamilyRole(context.actor.role)) redirect('/home');
  return <SignedInShell context={context} mainClassName="md:px-7 md:pb-7">{children}</SignedInShell>;
}
