import type { ReactNode } from 'react';
import { requireContext } from '@/lib/server/context';
import { SignedInShell } from '../signed-in-shell';

/** Screens that families and staff share. */
export default async function SharedLayout({ children }: { children: ReactNode }) {
  return <SignedInShell context={await requireContext()} mainClassName="md:px-7 md:pb-7">{children}</SignedInShell>;
}
