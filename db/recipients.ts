import type { Db } from './connection';

export type Recipient = { personId: string; name: string; address: string; wantsTopic: boolean };

type Row = { id: string; givenName: string; calledName: string | null; familyName: string; address: string | null; isOn: number | null };

/** Where a person is written to: the primary address that has not bounced, else the one they sign in with. */
export async function findRecipient(db: Db, personId: string, topic: string): Promise<Recipient | null> {
  const row = await db('person as p').where('p.id', personId).where('p.state', 'live')
    .leftJoin('user_account as u', 'u.personId', 'p.id')
    .leftJoin('notification_choice as n', (join) => {
      join.on('n.personId', 'p.id').andOnVal('n.topic', topic).andOnVal('n.channel', 'email');
    })
    .select<Row[]>('p.id', 'p.givenName', 'p.calledName', 'p.familyName', 'n.isOn', db.raw(
      `coalesce((SELECT c.value FROM contact_point c WHERE c.person_id = p.id AND c.kind = 'email' AND c.bounced_at IS NULL
         ORDER BY c.is_primary DESC, c.created_at LIMIT 1), u.email) AS address`))
    .first();
  if (!row?.address) return null;
  return { personId: row.id, name: `${row.calledName ?? row.givenName} ${row.familyName}`.trim(), address: row.address, wantsTopic: row.isOn !== 0 };
}
