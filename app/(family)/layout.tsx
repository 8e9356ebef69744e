import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { AccountMenu } from '@/components/shell/account-menu';
import { PhoneBottom, PhoneTop } from '@/components/shell/phone-bars';
import { Rail } from '@/components/shell/rail';
import { isFamilyRole } from '@/components/shell/sections';
import { shellFacts } from '@/lib/people/server/shell-facts';
import { requireContext } from '@/lib/server/context';
import { endAllSessions, wearHat } from '../actions';

export default async function FamilyLayout({ children }: { children: ReactNode }) {
  const context = await requireContext();
  // Comfort, not a guard: every screen and operation checks for itself.
  if (!isFamilyRole(context.actor.role)) redirect('/today');
  const { roles, ...facts } = await shellFacts(context);
  const hats = { roles, wear: wearHat, endAll: endAllSessions };
  return (
    <div className="min-h-dvh md:grid md:grid-cols-[196px_minmax(0,1fr)]">
      <Rail {...facts} hats={hats} />
      <div className="min-w-0">
        <PhoneTop aside={<AccountMenu personName={facts.personName} role={facts.role} hats={hats} compact />} />
        <main id="content" tabIndex={-1} className="focus:outline-none mx-auto min-w-0 max-w-[760px] px-4 pb-24 md:pb-8">{children}</main>
      </div>
      <PhoneBottom role={facts.role} />
    </div>
  );
}
