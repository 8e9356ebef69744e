import { findSchool } from '@/db/school';
import { DEMO_PASSWORD, DEMO_SIGN_INS } from '@/db/seeds/demo-people';
import { database } from '@/lib/server/database';
import { env } from '@/lib/server/env';

/** What `npm run up` prints when everything answers. */
async function main(): Promise<void> {
  const { NEXTAUTH_URL, MAIL_SINK_URL, CARD_PROCESSOR_URL } = env();
  const school = await findSchool(database());
  const lines = ['', `  ${school?.name ?? 'A new school'} is open at ${NEXTAUTH_URL}`];
  if (!school) lines.push('  Open that address to set the school up: name, time zone, currency and the first owner.');
  if (school?.isDemo) {
    lines.push('', `  Sign in with any of these; the password is always: ${DEMO_PASSWORD}`);
    for (const { role, email } of DEMO_SIGN_INS) lines.push(`    ${role.padEnd(22)} ${email}`);
  }
  lines.push('');
  if (MAIL_SINK_URL) lines.push(`  Mail that the school sends is shown at ${MAIL_SINK_URL}`);
  if (CARD_PROCESSOR_URL) lines.push(`  Card payments and their events are shown at ${CARD_PROCESSOR_URL}`);
  lines.push('  Stop everything with Ctrl-C.', '');
  console.info(lines.join('\n'));
  await database().destroy();
}

void main();
