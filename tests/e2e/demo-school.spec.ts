import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { SECTIONS } from '../../components/shell/sections';
import type { Role } from '../../policies/ability';
import { DEMO_URL } from '../playwright.config';
import { expect, signIn, test } from './fixtures';

/**
 * Every screen of the demo school, as each role, on a phone and at a desk: it opens without a complaint of the browser, nothing
 * runs out of the page, it meets WCAG 2.2 AA as far as a program can tell, and no word of the machine shows. A picture of each
 * is left in var/screens to be looked at.
 */
test.use({ baseURL: DEMO_URL });

const SIZES = { desk: { width: 1360, height: 860 }, phone: { width: 360, height: 780 } };
const PEOPLE: { role: Role; email: string; also: readonly string[]; opens: readonly string[] }[] = [
  {
    role: 'owner', email: 'ruth@saltmarsh.example.org', also: ['/tuition/invoices', '/tuition/payments', '/openings', '/components', '/ladder/edition', '/voicings'],
    opens: ['/enquiries', '/students', '/families', '/tuition', '/tuition/invoices', '/payroll'],
  },
  { role: 'desk', email: 'pat@saltmarsh.example.org', also: ['/openings', '/book', '/enquiries/new', '/tuition/invoices'], opens: ['/enquiries', '/students', '/families'] },
  { role: 'teacher', email: 'greta@saltmarsh.example.org', also: ['/register'], opens: ['/students', '/sheets'] },
  { role: 'guardian', email: 'noor@family.example.com', also: [], opens: ['/bills', '/progress'] },
  { role: 'student', email: 'ada@family.example.com', also: [], opens: ['/practice'] },
  { role: 'student', email: 'theo@family.example.com', also: [], opens: ['/bills'] },
];
const FAULT_TITLES = /^(This did not work|Nothing is here|This is not part of your role)/;
/** An id, a word with an underscore, or what a program says when it means nothing. */
const MACHINE_WORDS = /[0-9a-f]{8}-[0-9a-f]{4}-|\b[a-z]+_[a-z_]+\b|\bundefined\b|\bNaN\b|\[object |Invalid Date/;

/** Opens a screen and waits until what the browser asks for itself has come. */
async function settledStatus(page: Page, path: string): Promise<number | undefined> {
  const answer = await page.goto(path);
  await page.locator('h1').first().waitFor({ state: 'attached' });
  await expect(page.locator('main .animate-pulse:not([data-example] .animate-pulse)'), `${path} has loaded`).toHaveCount(0);
  return answer?.status();
}

async function isFit(page: Page, path: string, picture: string): Promise<void> {
  const status = await settledStatus(page, path);
  expect.soft(status, `${path} answers`).toBe(200);
  const title = await page.locator('h1').first().innerText();
  expect.soft(title, `${path} is a screen, not a fault`).not.toMatch(FAULT_TITLES);
  await page.screenshot({ path: `var/screens/${picture}.png`, fullPage: true, animations: 'disabled' });
  const overflowPx = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
  expect.soft(overflowPx, `${path} runs out of the page`).toBeLessThanOrEqual(0);
  expect.soft(await page.locator('body').innerText(), `${path} speaks of the machine`).not.toMatch(MACHINE_WORDS);
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze();
  expect.soft(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(' | ')}`), `${path} and accessibility`).toEqual([]);
}

/** Things that have no list of their own, and where they are found. */
const FOUND_ON: Record<string, string> = { '/sheets': '/ladder' };

/** The first thing a list leads to, if the list is not one thing already. */
async function firstOf(page: Page, list: string): Promise<string> {
  const start = FOUND_ON[list] ?? list;
  await settledStatus(page, start);
  const here = new URL(page.url()).pathname;
  if (here !== start) return here;
  const links = await page.locator(`main a[href^="${list}/"]`).evaluateAll((all) => all.map((link) => link.getAttribute('href') ?? ''));
  const found = links.find((href) => !['/tuition/invoices', '/tuition/payments', '/enquiries/new'].some((other) => list !== other && href.startsWith(other)));
  expect(found, `${list} leads to something`).toBeTruthy();
  return found ?? list;
}

for (const [size, viewport] of Object.entries(SIZES)) {
  test.describe(`at the size of a ${size}`, () => {
    test.use({ viewport });
    for (const { role, email, also, opens } of PEOPLE) {
      const name = email.split('@')[0] ?? role;
      test(`${name} (${role}) opens every screen`, async ({ page }) => {
        test.setTimeout(240_000);
        await signIn(page, email);
        const paths = [...new Set([...SECTIONS[role].map(({ href }) => href), ...also])];
        for (const path of paths) await isFit(page, path, `${name}${path.replaceAll('/', '-')}-${viewport.width}`);
        for (const list of opens) {
          const path = await firstOf(page, list);
          await isFit(page, path, `${name}${list.replaceAll('/', '-')}-one-${viewport.width}`);
          if (role === 'teacher' && list === '/students') await isFit(page, path.replace('/students/', '/hearings/'), `${name}-hearing-${viewport.width}`);
        }
      });
    }
    test('a visitor', async ({ page }) => {
      for (const path of ['/sign-in', '/forgot-password', '/trial', '/choose-password/not-a-link']) await isFit(page, path, `visitor${path.replaceAll('/', '-')}-${viewport.width}`);
    });
  });
}
