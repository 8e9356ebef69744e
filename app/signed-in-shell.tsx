import type { ReactNode } from 'react';
import { AccountMenu } from '@/components/shell/account-menu';
import { PhoneBottom, PhoneTop } from '@/components/shell/phone-bars';
import { Rail } from '@/components/shell/rail';
import { shellFacts } from '@/lib/people/server/shell-facts';
import type { SignedIn } from '@/lib/server/context';
import { endAllSessions, wearHat } from './actions';

type Props = { context: SignedIn; mainClassName: string; children: ReactNode };

/** Rail on a wide screen, bars on a phone, and the screen between them: the same for whoever is signed in. */
export async function SignedInShell({ context, mainClassName, children }: Props) {
  const { roles, ...facts } = await shellFacts(context);
  const hats = { roles, wear: wearHat, endAll: endAllSessions };
  return (
    <div className="min-h-dvh md:grid md:grid-cols-[196px_minmax(0,1fr)]">
      <Rail {...facts} hats={hats} />
      <div className="min-w-0">
        <PhoneTop aside={<AccountMenu personName={facts.personName} role={facts.role} hats={hats} compact />} />
        <main id="content" tabIndex={-1} className={`focus:outline-none min-w-0 px-4 pb-24 ${mainClassName}`}>{children}</main>
      </div>
      <PhoneBottom role={facts.role} />
    </div>
  );
}
