import { test as base, expect, type Page } from '@playwright/test';
import { DEMO_PASSWORD } from '../../db/seeds/demo-people';

type Faults = string[];
type Fixtures = {
  /** Whatever the browser complained about; a test fails on it at its end. */
  faults: Faults;
};

/** A message of the browser that is not a fault of ours: it reports answers such as 404 that a test provokes on purpose. */
const IS_ANSWER = /Failed to load resource: the server responded with a status of (4\d\d)/;

export const test = base.extend<Fixtures>({
  faults: [async ({ page }, use) => {
    const faults: Faults = [];
    watch(page, faults);
    await use(faults);
    expect(faults, 'faults the browser reported').toEqual([]);
  }, { auto: true }],
});

export function watch(page: Page, faults: Faults): void {
  page.on('pageerror', (error) => faults.push(error.message));
  page.on('console', (message) => {
    if (message.type() === 'error' && !IS_ANSWER.test(message.text())) faults.push(message.text());
  });
}

export async function signIn(page: Page, email: string, password: string = DEMO_PASSWORD): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

export type CaughtMail = { id: string; to: string; subject: string; text: string; messageId: string; attachments: { filename: string; contentType: string; content: string }[] };

/** Waits until the worker has sent this mail to the local mail server. */
export async function mailTo(sink: string, to: string, subject: RegExp): Promise<CaughtMail> {
  let found: CaughtMail | undefined;
  await expect.poll(async () => {
    const mails = (await (await fetch(`${sink}/api/mails?to=${encodeURIComponent(to)}`)).json()) as CaughtMail[];
    found = mails.find((mail) => subject.test(mail.subject));
    return found?.subject ?? null;
  }, { timeout: 20_000, message: `a mail to ${to}` }).toMatch(subject);
  if (!found) throw new Error('unreachable');
  return found;
}

export { expect } from '@playwright/test';
