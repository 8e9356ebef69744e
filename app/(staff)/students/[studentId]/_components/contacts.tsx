import { Mail, Phone } from 'lucide-react';
import Link from 'next/link';
import { Sheet } from '@/components/ui/sheet';
import type { StudentScreen } from '@/lib/people/server/read-students';

const RELATIONS = { mother: 'mother', father: 'father', guardian: 'guardian', other: 'other adult', self: 'the student' } as const;

/** Whom to call, one touch away on a phone; and the family whose account is billed. */
export function Contacts({ student: { family, contacts } }: { student: StudentScreen }) {
  if (!family && contacts === null) return null;
  return (
    <Sheet eyebrow="Family and contacts">
      {family ? <p className="mb-3"><Link href={`/families/${family.id}`} className="font-semibold text-petrol tap">{`${family.name} family`}</Link></p> : null}
      {contacts?.length === 0 ? <p className="text-ink-3">No guardian, number or address is on record.</p> : null}
      <ul className="grid gap-3">
        {(contacts ?? []).map(({ personId, name, relation, phone, email }) => (
          <li key={personId} className="min-w-0">
            <p><b>{name}</b> <span className="text-ink-3">{RELATIONS[relation]}</span></p>
            {phone ? <ContactLink href={`tel:${phone.replace(/[^+\d]/g, '')}`} icon={<Phone size={15} aria-hidden />}>{phone}</ContactLink> : relation === 'self' ? null : <p className="text-small text-ink-3">No number on record.</p>}
            {email ? <ContactLink href={`mailto:${email}`} icon={<Mail size={15} aria-hidden />}>{email}</ContactLink> : null}
          </li>
        ))}
      </ul>
    </Sheet>
  );
}

const ContactLink = ({ href, icon, children }: { href: string; icon: React.ReactNode; children: string }) => (
  <a href={href} className="flex items-center gap-2 py-1 text-petrol tap"><span className="shrink-0">{icon}</span><span className="num min-w-0 [overflow-wrap:anywhere]">{children}</span></a>
);
