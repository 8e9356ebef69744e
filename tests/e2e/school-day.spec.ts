import { readFileSync } from 'node:fs';
import ExcelJS from 'exceljs';
import type { Browser, BrowserContext, Locator, Page } from '@playwright/test';
import { EMPTY_MAIL_URL, EMPTY_URL } from '../playwright.config';
import { expect, mailTo, signIn, test, watch } from './fixtures';

/**
 * One school day from the first set-up to the guardian's progress page, on real input and through the real parts.
 * It runs on any day of the year at any hour: the school's zone is one where the morning has not begun to teach.
 */
const EXPECTED = JSON.parse(readFileSync('tests/support/data/heron-court.expected.json', 'utf8')) as { sheets: Record<string, { imported: number }>; problems: { sheet: string; row: number; what: string }[] };
const OWNER = { email: 'ruth@heron.example.org', password: 'four herons at the court' };
const DESK = { email: 'pat@heron.example.org', password: 'a desk with two telephones' };
const GUARDIAN = { email: 'marta@family.example.com', password: 'the tide comes in at nine' };
const TEACHER_PASSWORD = 'ten fingers and one foot';
const PHONE = { viewport: { width: 360, height: 780 }, hasTouch: true, isMobile: true };

test.use({ baseURL: EMPTY_URL });
test.describe.configure({ mode: 'serial' });

const hourIn = (timeZone: string) => Number(new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', hourCycle: 'h23' }).format(new Date()));
const ZONE = Intl.supportedValuesOf('timeZone').find((zone) => hourIn(zone) >= 4 && hourIn(zone) <= 7) ?? 'Europe/Dublin';
const dayIn = (offset: number): string => {
  const today = new Intl.DateTimeFormat('en-CA', { timeZone: ZONE }).format(new Date());
  return new Date(Date.parse(`${today}T12:00:00Z`) + offset * 86_400_000).toISOString().slice(0, 10);
};
/** The last week of the month before: its lessons are marked and paid in this test. */
const LAST_MONTH_END = new Date(Date.UTC(Number(dayIn(0).slice(0, 4)), Number(dayIn(0).slice(5, 7)) - 1, 0, 12)).toISOString().slice(0, 10);
const LESSONS_FROM = new Date(Date.parse(`${LAST_MONTH_END}T12:00:00Z`) - 6 * 86_400_000).toISOString().slice(0, 10);

const PAY_MONTH = LAST_MONTH_END.slice(0, 7);
const LAST_MONTH = new Intl.DateTimeFormat('en-IE', { month: 'short', timeZone: 'UTC' }).format(new Date(`${LAST_MONTH_END}T12:00:00Z`));

let teacherName = '';
const teacherEmails = new Map<string, string>();
let bookedRoom = '';
let bookedWhen = '';

async function person(browser: Browser, faults: string[], options: object = {}): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext({ baseURL: EMPTY_URL, locale: 'en-IE', ...options });
  const page = await context.newPage();
  watch(page, faults);
  return { context, page };
}

/** Opens the mailed invitation, chooses a password and signs in. */
async function acceptInvitation(page: Page, email: string, password: string): Promise<void> {
  const mail = await mailTo(EMPTY_MAIL_URL, email, /access/i);
  const link = /http\S+\/choose-password\/\S+/.exec(mail.text)?.[0];
  if (!link) throw new Error('the invitation carries no link');
  await page.goto(link);
  await page.getByLabel('New password').fill(password);
  await page.getByRole('button', { name: 'Set the password' }).click();
  await page.waitForURL(/sign-in/);
  await signIn(page, email, password);
}

/** The owner lets a person of the school in; gives the address the invitation goes to. */
async function invite(page: Page, name: string, role: string): Promise<string> {
  await page.goto('/settings');
  await page.getByRole('tab', { name: 'Access' }).click();
  const form = page.locator('section').filter({ hasText: 'Invite somebody of the school' });
  await form.getByLabel('Person').selectOption({ label: name });
  const email = await form.getByLabel('E-mail to sign in with').inputValue();
  await form.getByLabel('Role').selectOption({ label: role });
  await form.getByRole('button', { name: 'Invite' }).click();
  await expect(page.getByRole('row').filter({ hasText: email })).toBeVisible();
  return email;
}

const confirmIn = (page: Page) => page.getByRole('dialog');

test('the school is set up and the messy workbook comes in', async ({ page, browser, faults }) => {
  test.setTimeout(240_000);
  await test.step('a new school opens the first-run set-up', async () => {
    await page.goto('/');
    await expect(page).toHaveURL(/set-up/);
    await page.getByLabel('Name of the school').fill('Heron Court');
    await page.getByLabel('Name of your first site').fill('Court Lane');
    await page.getByLabel('Time zone').selectOption(ZONE);
    await page.getByLabel('Currency').selectOption('EUR');
    await page.getByLabel('Country').selectOption('IE');
    await page.getByLabel('Your name').fill('Ruth Ames');
    await page.getByLabel('Your e-mail').fill(OWNER.email);
    await page.getByLabel('Password').fill(OWNER.password);
    await page.getByRole('button', { name: 'Open the school' }).click();
    await expect(page).toHaveURL(/today/);
  });

  await test.step('every row of the workbook has its verdict', async () => {
    await page.goto('/import');
    await page.getByLabel('Workbook').setInputFiles('tests/support/data/heron-court.xlsx');
    await page.getByRole('button', { name: 'Read it' }).click();
    await page.waitForURL(/import\/.+/);
    await page.getByRole('radio', { name: 'Employees' }).check();
    await page.getByRole('textbox', { name: 'Name', exact: true }).fill('First term');
    await page.getByLabel('First day').fill(LESSONS_FROM);
    await page.getByLabel('Last day').fill(dayIn(42));
    await page.getByLabel(/Lay lessons from/).fill(LESSONS_FROM);
    await page.getByRole('button', { name: 'Check again' }).click();
    await expect(page.getByRole('button', { name: /^Bring in/ })).toBeVisible({ timeout: 30_000 });
    const only = page.getByRole('checkbox', { name: /rows that are left out/ });
    if (!(await only.isChecked())) await only.check();
    for (const sheet of new Set(EXPECTED.problems.map((problem) => problem.sheet))) {
      await page.getByRole('tab', { name: new RegExp(sheet) }).click();
      const panel = page.getByRole('tabpanel', { name: new RegExp(sheet) });
      for (const { row, what } of EXPECTED.problems.filter((problem) => problem.sheet === sheet)) {
        await expect(panel.getByRole('row').filter({ has: page.getByText(String(row), { exact: true }) }).filter({ hasText: what }).first()).toBeVisible();
      }
    }
  });

  await test.step('it comes in at once, and a second time changes nothing', async () => {
    await page.getByRole('button', { name: /^Bring in/ }).click();
    await confirmIn(page).getByRole('button', { name: /^Bring in/ }).click();
    await expect(page.getByText('Brought in.', { exact: true })).toBeVisible({ timeout: 60_000 });
    await page.goto('/students');
    await expect(page.getByText(`${EXPECTED.sheets.Students?.imported ?? 0} students.`)).toBeVisible();
    await page.goto('/import');
    await page.getByLabel('Workbook').setInputFiles('tests/support/data/heron-court.xlsx');
    await page.getByRole('button', { name: 'Read it' }).click();
    await page.waitForURL(/import\/.+/);
    await expect(page.getByText('There is no new row to bring in.')).toBeVisible({ timeout: 30_000 });
  });

  await test.step('the owner sets what may not be guessed and lets people in', async () => {
    await page.goto('/settings');
    const setPrice = async (what: string, minutes: string, amount: string) => {
      await page.getByLabel('What', { exact: true }).selectOption({ label: what });
      await page.getByLabel(/Minutes/).fill(minutes);
      await page.getByLabel('Price', { exact: true }).fill(amount);
      await page.getByLabel('From', { exact: true }).fill(LESSONS_FROM);
      await page.getByRole('button', { name: 'Set the price' }).click();
      await expect(page.getByRole('row').filter({ hasText: minutes === '' ? what : `${what}, ${minutes} min` }).filter({ hasText: '€' }).first()).toBeVisible();
    };
    await setPrice('Lesson', '30', '30,00');
    await setPrice('Registration', '', '35.00');
    await page.getByRole('tab', { name: 'Tax' }).click();
    await page.getByRole('radio', { name: /Exempt/ }).check();
    await page.getByRole('textbox', { name: 'Reason' }).fill('Private tuition; confirmed by our adviser');
    await page.getByLabel('From', { exact: true }).fill(LESSONS_FROM);
    await page.getByRole('button', { name: 'Set the treatment' }).click();
    await expect(page.getByText('tuition: exempt')).toBeVisible();
    await page.getByRole('tab', { name: 'Teachers' }).click();
    for (const box of await page.getByRole('form', { name: 'Background checks' }).getByRole('checkbox').all()) await box.check();
    await page.getByRole('button', { name: 'Record', exact: true }).click();
    await expect(page.getByText(/check good until/).first()).toBeVisible();
    await page.getByRole('tab', { name: 'Access' }).click();
    const invitation = page.locator('section').filter({ hasText: 'Invite somebody new' });
    await invitation.getByLabel('Name').fill('Pat Linden');
    await invitation.getByLabel('E-mail').fill(DESK.email);
    await invitation.getByRole('button', { name: 'Invite' }).click();
    await expect(page.getByRole('row').filter({ hasText: DESK.email })).toBeVisible();
  });

  const desk = await person(browser, faults);
  await acceptInvitation(desk.page, DESK.email, DESK.password);
  await expect(desk.page).toHaveURL(/today/);
  await desk.context.close();
});

test('a stranger asks, the desk finds true openings, holds one, books the trial and enrols', async ({ browser, faults }) => {
  test.setTimeout(180_000);
  const stranger = await person(browser, faults, PHONE);
  await test.step('the stranger fills the public enquiry on a phone', async () => {
    const { page } = stranger;
    await page.goto('/trial');
    await page.getByRole('button', { name: 'Send the enquiry' }).click();
    await expect(page.getByText('Enter the student’s name.')).toBeVisible();
    await page.getByLabel('The student’s name').fill('Wren Adair');
    await page.getByLabel(/Age/).fill('9');
    await page.getByLabel('Your name (parent or guardian)').fill('Marta Adair');
    await page.getByLabel('E-mail').fill(GUARDIAN.email);
    for (const day of ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday']) await page.getByRole('checkbox', { name: `${day}, after school` }).check();
    await page.getByRole('checkbox', { name: /You may write to me/ }).check();
    await page.getByRole('button', { name: 'Send the enquiry' }).click();
    await expect(page.getByText('Thank you, it has arrived')).toBeVisible();
    await mailTo(EMPTY_MAIL_URL, GUARDIAN.email, /Your enquiry/);
  });
  await stranger.context.close();

  const { page, context } = await person(browser, faults);
  await signIn(page, DESK.email, DESK.password);
  await test.step('the desk sees it in Today and holds a real opening', async () => {
    await expect(page.getByText('1 new enquiry')).toBeVisible();
    await page.getByRole('link', { name: 'Find an opening' }).first().click();
    await page.getByRole('row').filter({ hasText: 'Wren Adair' }).getByRole('link', { name: 'Find an opening' }).click();
    await page.getByRole('button', { name: 'Hold' }).first().click();
    await page.waitForURL(/enquiries\/.+/);
    const held = page.getByRole('listitem').filter({ hasText: 'Held until' });
    await expect(held).toHaveCount(1);
    const words = (await held.locator('p').first().innerText()).split(' · ');
    [bookedWhen = '', bookedRoom = '', teacherName = ''] = words.map((word) => word.trim());
  });
  await test.step('the trial is booked and the family gets the date for its calendar', async () => {
    await page.getByRole('button', { name: 'Book the trial' }).click();
    await expect(page.getByText('Trial lesson', { exact: true })).toBeVisible();
    const mail = await mailTo(EMPTY_MAIL_URL, GUARDIAN.email, /Your trial lesson/);
    expect(mail.attachments).toHaveLength(1);
    expect(mail.attachments[0]?.content).toContain('BEGIN:VEVENT');
  });
  await test.step('the same room at the same time is refused, with a sentence that says who has it', async () => {
    const start = /(\d\d:\d\d)–/.exec(bookedWhen)?.[1] ?? '';
    await page.goto('/book');
    await page.getByLabel('What').selectOption({ label: 'Rehearsal' });
    await page.getByLabel('Title').fill('House band');
    await page.getByLabel('Room').selectOption({ label: `${bookedRoom}, Court Lane` });
    await page.getByLabel('Date').fill(await trialDate(page));
    await page.getByLabel('Start').fill(start);
    await page.getByRole('button', { name: 'Book', exact: true }).click();
    await expect(page.getByText(new RegExp(`${bookedRoom} is taken by Wren Adair with ${teacherName}`)).first()).toBeVisible();
  });
  await test.step('the weekly lessons of the term appear, and nothing clashes', async () => {
    await page.goto('/enquiries');
    await page.getByRole('row').filter({ hasText: 'Wren Adair' }).click();
    await page.getByRole('link', { name: 'Enrol', exact: true }).click();
    await page.getByRole('button', { name: 'Find weekly openings' }).click();
    const own = page.getByRole('listitem').filter({ hasText: teacherName });
    await own.getByRole('button', { name: 'Choose' }).first().click();
    await page.getByRole('checkbox', { name: /terms have been accepted/ }).check();
    await page.getByRole('button', { name: 'Enrol', exact: true }).click();
    await page.waitForURL(/students\/.+/);
    await expect(page.getByRole('heading', { name: 'Wren Adair' })).toBeVisible();
    const times = await page.getByText(/\d\d:\d\d–\d\d:\d\d/).allInnerTexts();
    expect(times.length).toBeGreaterThanOrEqual(4);
    await mailTo(EMPTY_MAIL_URL, GUARDIAN.email, /Enrolled at/);
  });
  await context.close();
});

/** The date of the booked trial, as the board's address knows it. */
async function trialDate(page: Page): Promise<string> {
  for (let offset = 1; offset <= 14; offset += 1) {
    const date = dayIn(offset);
    const short = new Intl.DateTimeFormat('en-IE', { weekday: 'short', day: 'numeric', month: 'short', timeZone: 'UTC' }).format(new Date(`${date}T12:00:00Z`)).replace(/,/g, '');
    if (bookedWhen.startsWith(short)) return date;
  }
  throw new Error(`no date reads like ${bookedWhen} on ${page.url()}`);
}

test('the teacher marks lessons on a phone and passes two rungs with proof', async ({ browser, faults }) => {
  test.setTimeout(240_000);
  const owner = await person(browser, faults);
  await signIn(owner.page, OWNER.email, OWNER.password);
  await owner.page.goto('/students');
  teacherName = await owner.page.getByRole('row').filter({ hasText: 'Wren Adair' }).getByRole('cell').nth(2).innerText();
  const teacherEmail = await invite(owner.page, teacherName, 'Teacher');
  await invite(owner.page, 'Marta Adair', 'Guardian');
  teacherEmails.set(teacherName, teacherEmail);
  await owner.context.close();

  const { page, context } = await person(browser, faults, PHONE);
  await acceptInvitation(page, teacherEmail, TEACHER_PASSWORD);
  await test.step('attendance in one press', async () => {
    await page.goto('/register');
    const rows = page.getByRole('group', { name: /Attendance of/ });
    const before = await rows.count();
    expect(before).toBeGreaterThan(0);
    await rows.first().getByRole('button', { name: 'Here' }).click();
    await expect(rows).toHaveCount(before - 1);
  });
  await test.step('the first rung is told aloud', async () => {
    await openHearing(page);
    await page.getByRole('button', { name: 'Begin the hearing' }).click();
    await page.getByRole('checkbox', { name: 'Go on by itself' }).uncheck();
    for (let key = 0; key < 7; key += 1) await pressAndSettle(page, page.getByRole('button', { name: 'Right', exact: true }), key + 1);
    await passRung(page);
  });
  await test.step('the next is played on the on-screen keyboard, judged and stored', async () => {
    await openHearing(page);
    await page.getByRole('button', { name: 'Begin the hearing' }).click();
    await page.getByRole('checkbox', { name: 'Go on by itself' }).uncheck();
    await page.getByRole('checkbox', { name: /Keep keys down/ }).check();
    for (let key = 0; key < 9; key += 1) {
      for (const number of await markedKeys(page)) await page.locator(`rect[data-key="${number}"]`).click();
      await pressAndSettle(page, page.getByRole('button', { name: /^Hear these/ }), key + 1);
    }
    await passRung(page);
  });
  await context.close();
});

async function openHearing(page: Page): Promise<void> {
  await page.goto('/students');
  await page.getByText('Wren Adair').click();
  await page.waitForURL(/students\/.+/);
  await page.getByRole('link', { name: 'Hear a rung' }).click();
  await page.waitForURL(/hearings\/.+/);
}

const markedKeys = (page: Page): Promise<string[]> =>
  page.locator('rect[data-key][aria-label*=","]').evaluateAll((rects) => rects.map((rect) => rect.getAttribute('data-key') ?? ''));

/** Presses, then waits until the count of keys heard has moved on. */
async function pressAndSettle(page: Page, button: Locator, heard: number): Promise<void> {
  await button.first().click();
  await expect(page.getByRole('region', { name: 'Keys heard' }).getByText(new RegExp(`^${heard} of`))).toBeVisible();
  await page.getByRole('button', { name: 'Next key' }).click();
}

async function passRung(page: Page): Promise<void> {
  await page.getByRole('region', { name: /Teacher.s ear/ }).getByRole('button', { name: /Pass the rung/ }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel(/A word for the family/).fill('Steady and clear.');
  await dialog.getByRole('button', { name: 'Pass the rung' }).click();
  await expect(dialog).toBeHidden();
}

test('the tuition run is released, paid on the card page and counted once', async ({ browser, faults, request }) => {
  test.setTimeout(240_000);
  const owner = await person(browser, faults);
  await signIn(owner.page, OWNER.email, OWNER.password);
  await test.step('the owner previews and releases', async () => {
    const { page } = owner;
    await page.goto('/tuition');
    await page.getByRole('button', { name: 'Work out bills' }).first().click();
    await page.getByRole('dialog').getByLabel('Term', { exact: true }).selectOption({ index: 0 });
    await page.getByRole('button', { name: 'Work them out' }).click();
    await page.waitForURL(/tuition\/.+/);
    await page.getByRole('button', { name: /^Release/ }).click();
    await confirmIn(page).getByRole('button', { name: /^Release/ }).click();
    await confirmIn(page).getByRole('button', { name: 'See the run' }).click({ timeout: 90_000 });
  });
  await owner.context.close();

  const { page, context } = await person(browser, faults, PHONE);
  await acceptInvitation(page, GUARDIAN.email, GUARDIAN.password);
  await mailTo(EMPTY_MAIL_URL, GUARDIAN.email, /[Ii]nvoice/);
  await test.step('the guardian opens the bill and pays it on the hosted card page', async () => {
    await page.goto('/home');
    await page.getByRole('link', { name: 'Pay', exact: true }).click();
    await page.getByRole('button', { name: /^Pay .* now$/ }).click();
    await page.waitForURL(/127\.0\.0\.1/);
    await page.getByLabel(/[Nn]umber/).fill('4242 4242 4242 4242');
    await page.getByLabel(/[Ee]xpir/).fill('12/39');
    await page.getByLabel(/[Cc]ode|CVC|[Ss]ecurity/).fill('123');
    await page.getByRole('button', { name: /^Pay/ }).click();
    await page.waitForURL(/bills\/paid/);
    await expect(page.getByText(/received/).first()).toBeVisible();
    await mailTo(EMPTY_MAIL_URL, GUARDIAN.email, /[Rr]eceipt/);
  });
  await test.step('the same event again changes nothing', async () => {
    const processor = 'http://127.0.0.1:3227';
    const desk = await (await request.get(`${processor}/`)).text();
    const sends = [...desk.matchAll(/action="(\/events\/[^"]+\/send)"/g)].map((match) => match[1] ?? '');
    expect(sends.length).toBeGreaterThan(0);
    for (const path of [...sends, ...sends]) await request.post(`${processor}${path}`);
    await page.goto('/bills');
    await expect(page.getByText('What you have paid')).toBeVisible();
    await expect(page.getByText(/^Receipt/)).toHaveCount(1);
    await page.goto('/home');
    await expect(page.getByText('Nothing is open. Thank you.')).toBeVisible();
  });
  await test.step('progress reads in plain words', async () => {
    await page.goto('/progress');
    await expect(page.getByText(/Wren can now/).first()).toBeVisible();
    await expect(page.getByText(/2 of 37 rungs passed/).first()).toBeVisible();
  });
  await test.step('nobody sees what is not theirs', async () => {
    for (const path of ['/payroll', '/families', '/students', '/tuition', '/settings', '/import']) {
      await page.goto(path);
      await expect(page).toHaveURL(/home/);
    }
  });
  await context.close();
});

test('the pay run is built from the marks, checked, closed, and its workbook ties', async ({ browser, faults }) => {
  test.setTimeout(300_000);
  const owner = await person(browser, faults);
  const { page } = owner;
  await signIn(page, OWNER.email, OWNER.password);
  await test.step('every lesson of the month is marked', async () => {
    await page.goto('/register');
    const list = page.getByRole('list', { name: 'Lessons without a mark' });
    const rows = list.getByRole('group', { name: /Attendance of/ });
    const ofLastMonth = list.getByRole('listitem').filter({ hasText: new RegExp(` ${LAST_MONTH}\\b`) });
    expect(await ofLastMonth.count()).toBeGreaterThan(0);
    while ((await ofLastMonth.count()) > 0) {
      const before = await rows.count();
      await ofLastMonth.first().getByRole('button', { name: 'Here' }).click();
      if (before === 1) break;
      await expect(rows).toHaveCount(before - 1);
    }
    await expect(ofLastMonth).toHaveCount(0);
  });
  await test.step('the run is built and sent to the teachers', async () => {
    await page.goto('/payroll');
    await page.getByLabel('Month').fill(PAY_MONTH);
    await page.getByRole('button', { name: 'Build the pay' }).click();
    await page.waitForURL(/payroll\/.+/);
    await expect(page.getByRole('button', { name: 'Send for checking' })).toBeEnabled();
    await page.getByRole('button', { name: 'Send for checking' }).click();
    await confirmIn(page).getByRole('button', { name: 'Send for checking' }).click();
    await expect(confirmIn(page)).toBeHidden();
  });
  const runUrl = page.url();
  const table = page.getByRole('table', { name: 'Pay by teacher' });
  await test.step('each teacher opens their lines on a phone, reads why, and agrees', async () => {
    const names = await table.getByRole('link').allInnerTexts();
    expect(names.length).toBeGreaterThan(1);
    for (const name of names) {
      const isNew = !teacherEmails.has(name);
      const email = teacherEmails.get(name) ?? (await invite(page, name, 'Teacher'));
      const teacher = await person(browser, faults, PHONE);
      await (isNew ? acceptInvitation(teacher.page, email, TEACHER_PASSWORD) : signIn(teacher.page, email, TEACHER_PASSWORD));
      await teacher.page.goto('/my-hours');
      const working = teacher.page.getByRole('button', { name: /show how this was worked out/ }).first();
      await working.click();
      await expect(teacher.page.locator(`[id="${(await working.getAttribute('aria-controls')) ?? ''}"]`).getByRole('listitem').first()).not.toBeEmpty();
      await teacher.page.getByRole('button', { name: /^I agree to/ }).click();
      await expect(teacher.page.getByText('You have agreed.')).toBeVisible();
      await teacher.context.close();
    }
  });
  await test.step('the owner approves and closes', async () => {
    await page.goto(runUrl);
    for (const name of ['Approve', 'Close the run']) {
      await page.getByRole('button', { name, exact: true }).click();
      await confirmIn(page).getByRole('button', { name, exact: true }).click();
      await expect(confirmIn(page)).toBeHidden();
    }
    await expect(page.getByText('closed', { exact: true }).first()).toBeVisible();
  });
  await test.step('the workbook has the same total and no formula', async () => {
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Workbook' }).click()]);
    const book = new ExcelJS.Workbook();
    await book.xlsx.readFile(await download.path());
    const gross = (await table.getByRole('row').last().innerText()).match(/[\d,]+\.\d\d/g)?.at(-1)?.replaceAll(',', '') ?? '';
    const numbers: number[] = [];
    let formulas = 0;
    book.worksheets[0]?.eachRow((row) => row.eachCell((cell) => {
      if (cell.formula) formulas += 1;
      if (typeof cell.value === 'number') numbers.push(cell.value);
    }));
    expect(formulas).toBe(0);
    expect(Number(gross)).toBeGreaterThan(0);
    expect(numbers.map((number) => number.toFixed(2))).toContain(gross);
  });
  await owner.context.close();
});
