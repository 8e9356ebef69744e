#!/usr/bin/env node
/**
 * Takes the pictures of the README's tour from a demo school that is open already:
 *   npm run pictures -- http://localhost:3000
 * Each picture is one screen of a demo sign-in, at the width of a desk or of a phone. One hearing is begun and
 * stopped, which counts as no attempt; nothing else is written to the school.
 */
import { mkdirSync, statSync } from 'node:fs';
import path from 'node:path';
import { chromium } from '@playwright/test';
import { DEMO_PASSWORD } from '../../db/seeds/demo-people.ts';

const BASE = process.argv[2] ?? 'http://localhost:3000';
const FOLDER = path.resolve(import.meta.dirname, '../../public/tour');
const MOST_BYTES = 150_000;
/** The tallest of these that stays below the limit is taken. */
const SIZES = { desk: { width: 1360, heights: [850, 760, 680, 600] }, phone: { width: 360, heights: [780, 700, 640] } };
const PEOPLE = { owner: 'ruth@saltmarsh.example.org', desk: 'pat@saltmarsh.example.org', teacher: 'greta@saltmarsh.example.org', guardian: 'noor@family.example.com', student: 'ada@family.example.com' };

const LAUNCH = {
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--no-first-run'],
};

/** Opens a list and follows its first link to one thing of it, leaving out the sections beside it. */
const firstOf = (list, except = []) => async (page) => {
  await page.goto(list, { waitUntil: 'networkidle' });
  if (new URL(page.url()).pathname !== list) return;
  const links = await page.locator(`main a[href^="${list}/"]`).evaluateAll((all) => all.map((link) => link.getAttribute('href')));
  const href = links.find((link) => !except.some((part) => link.startsWith(part)));
  if (!href) throw new Error(`nothing to open on ${list}`);
  await page.goto(href, { waitUntil: 'networkidle' });
};
const at = (address) => (page) => page.goto(address, { waitUntil: 'networkidle' });

async function hearing(page) {
  await page.goto('/students', { waitUntil: 'networkidle' });
  await page.getByRole('link', { name: 'Ada Vale' }).click();
  await page.waitForURL('**/students/*');
  await page.goto(`/hearings/${new URL(page.url()).pathname.split('/').at(-1)}`, { waitUntil: 'networkidle' });
  await page.getByRole('button', { name: 'Begin the hearing' }).click();
  await page.locator('rect[data-key]').first().waitFor();
}
async function stopHearing(page) {
  await page.getByRole('button', { name: /^Stop, no attempt/ }).click();
  await page.getByLabel('Why it stops').fill('Begun for a picture');
  await page.getByRole('button', { name: 'Stop the hearing' }).click();
  await page.getByRole('dialog').waitFor({ state: 'hidden' });
}

const TOUR = [
  { name: 'desk-today', who: 'desk', size: 'desk', open: at('/today') },
  { name: 'calendar', who: 'desk', size: 'desk', open: at('/calendar'), until: '.fc-timegrid, [class*="fc-"]' },
  { name: 'hearing', who: 'teacher', size: 'desk', open: hearing, afterwards: stopHearing },
  { name: 'pay-run', who: 'owner', size: 'desk', open: firstOf('/payroll') },
  { name: 'tuition-run', who: 'owner', size: 'desk', open: firstOf('/tuition', ['/tuition/invoices', '/tuition/payments']) },
  { name: 'teacher-today', who: 'teacher', size: 'phone', open: at('/today') },
  { name: 'guardian-home', who: 'guardian', size: 'phone', open: at('/home') },
  { name: 'guardian-bill', who: 'guardian', size: 'phone', open: firstOf('/bills') },
  { name: 'guardian-progress', who: 'guardian', size: 'phone', open: firstOf('/progress') },
  { name: 'voicings', who: 'teacher', size: 'desk', open: at('/voicings'), until: 'figure svg' },
  { name: 'student-practice', who: 'student', size: 'phone', open: firstOf('/practice') },
];

async function signIn(page, email) {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

async function take(page, { name, size, open, until }) {
  const { width, heights } = SIZES[size];
  await page.setViewportSize({ width, height: heights[0] });
  await open(page);
  await page.locator('main h1').first().waitFor({ state: 'attached' });
  const title = await page.locator('main h1').first().innerText();
  if (/^(This did not work|Nothing is here|This is not part of your role)/.test(title)) throw new Error(`${name} shows “${title}”`);
  if (until) await page.locator(until).first().waitFor();
  const file = path.join(FOLDER, `${name}.png`);
  for (const height of heights) {
    await page.setViewportSize({ width, height });
    await page.evaluate(() => document.fonts.ready);
    await page.waitForTimeout(600);
    await page.screenshot({ path: file, animations: 'disabled', caret: 'hide' });
    if (statSync(file).size < MOST_BYTES) return process.stdout.write(`${name}: ${width} × ${height}, ${Math.ceil(statSync(file).size / 1000)} kB\n`);
  }
  throw new Error(`${name} stays above ${MOST_BYTES / 1000} kB`);
}

mkdirSync(FOLDER, { recursive: true });
const browser = await chromium.launch(LAUNCH);
try {
  for (const who of new Set(TOUR.map((picture) => picture.who))) {
    const context = await browser.newContext({ baseURL: BASE, locale: 'en-IE', timezoneId: 'Europe/Dublin', reducedMotion: 'reduce' });
    const page = await context.newPage();
    await signIn(page, PEOPLE[who]);
    for (const picture of TOUR.filter((one) => one.who === who)) {
      await take(page, picture);
      await picture.afterwards?.(page);
    }
    await context.close();
  }
} finally {
  await browser.close();
}
