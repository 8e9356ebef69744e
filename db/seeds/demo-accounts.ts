import { newId } from '@/lib/server/ids';
import type { Role } from '@/policies/ability';
import { grantRole, insertAccount } from '../accounts';
import type { Trx } from '../connection';
import { insertContact } from '../people';

type DemoAccount = { personId: string; email: string; roles: Role[]; passwordHash: string; isLead?: boolean };

export async function giveAccount(trx: Trx, { personId, email, roles, passwordHash, isLead = false }: DemoAccount): Promise<void> {
  const userId = newId();
  await insertContact(trx, { id: newId(), personId, kind: 'email', value: email });
  await insertAccount(trx, { id: userId, personId, email, passwordHash, state: 'live' });
  for (const role of roles) await grantRole(trx, { id: newId(), userId, role, isLead: isLead && role === 'teacher' });
}
