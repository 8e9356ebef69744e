import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { isFamilyRole } from '@/components/shell/sections';
import { requireContext } from '@/lib/server/context';
import { SignedInShell } from '../signed-in-shell';

export default async function FamilyLayout({ children }: { children: ReactNode }) {
  const context = await requireContext();
  // Comfort, not a guard: every screen and operation checks for itself.
  if (!isFamilyRole(context.actor.role)) redirect('/today');
  return <SignedInShell context={context} mainClassName="mx-auto max-w-[760px] md:pb-8">{children}</SignedInShell>;
}
