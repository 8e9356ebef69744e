import type { Page } from '@playwright/test';
import { DEMO_URL } from '../playwright.config';
import { expect, signIn, test } from './fixtures';
import { keysNamed, playChord, plugInKeyboard } from './midi-keyboard';

test.use({ baseURL: DEMO_URL });

/** What the stave shows now, as a screen reader hears it. */
const askedKeys = async (page: Page): Promise<number[]> => keysNamed((await page.getByRole('img', { name: / from|: [A-G]/ }).first().getAttribute('aria-label')) ?? '');

test.describe('on a phone', () => {
  test.use({ viewport: { width: 360, height: 780 } });

  test('a hearing from the draw to the pass, heard from a MIDI keyboard', async ({ page }) => {
    await plugInKeyboard(page);
    await signIn(page, 'greta@saltmarsh.example.org');
    await page.goto('/students');
    const name = 'Amina Pellew';
    await page.getByRole('link', { name }).click();
    await page.waitForURL('**/students/*');
    await page.goto(page.url().replace('/students/', '/hearings/'));
    await page.getByRole('button', { name: 'Begin the hearing' }).click();
    await expect(page.getByRole('region', { name: 'Asked now' })).toBeVisible();
    await page.getByRole('checkbox', { name: 'Go on by itself' }).uncheck();
    const spoken = page.getByRole('group', { name: 'Was it right?' });
    const grid = page.getByRole('region', { name: 'Keys heard' }).getByRole('button');
    const keyCount = await grid.count();
    if (!(await spoken.isVisible())) await page.getByRole('button', { name: 'Switch MIDI on' }).click();
    for (let at = 0; at < keyCount; at += 1) {
      if (await spoken.isVisible()) await spoken.getByRole('button', { name: 'Right', exact: true }).click();
      else await playTurn(page);
      await expect(grid.nth(at)).toContainText('asked now');
      await expect(page.getByRole('region', { name: 'Keys heard' })).toContainText(`${at + 1} of ${keyCount}.`);
      if (at + 1 < keyCount) await page.getByRole('button', { name: 'Next key' }).click();
    }
    await page.getByRole('button', { name: 'Pass the rung' }).click();
    await page.getByRole('dialog').getByRole('button', { name: /^Pass/ }).click();
    await expect(page.getByRole('region', { name: 'Asked now' })).toBeHidden();
  });

  /** Every chord of the turn that is asked now, one after the other. */
  async function playTurn(page: Page): Promise<void> {
    const turn = page.getByRole('list', { name: 'Chords in turn' }).getByRole('listitem');
    const chords = Math.max(1, await turn.count());
    for (let chord = 0; chord < chords; chord += 1) {
      if (chords > 1) await expect(turn.nth(chord)).toHaveAttribute('aria-current', 'step');
      await playChord(page, await askedKeys(page));
    }
  }

  test('a student reviews a rung: a wrong chord is named, the right ones sit, and it comes back another day', async ({ page }) => {
    await plugInKeyboard(page);
    await signIn(page, 'ada@family.example.com');
    await page.getByRole('link', { name: 'Practice' }).click();
    const row = page.getByRole('listitem').filter({ hasText: 'comes back' });
    await row.first().waitFor();
    const before = await row.count();
    await row.first().getByRole('link', { name: /^Practise/ }).click();
    await page.getByRole('button', { name: 'Switch MIDI on' }).click();
    await expect(page.getByText('MIDI: listening')).toBeVisible();
    await playChord(page, [60, 61, 62]);
    await expect(page.getByText(/^(Not this chord yet|One note to avoid)\./)).toBeVisible();
    await page.getByRole('button', { name: 'Show the answer' }).click();
    const keys = page.getByRole('navigation', { name: 'Keys of this piece' }).getByRole('button');
    const keyCount = await keys.count();
    for (let at = 0; at < keyCount; at += 1) {
      await keys.nth(at).click();
      await playChord(page, await askedKeys(page));
      await expect(page.getByText('Right notes, right order.')).toBeVisible();
    }
    await page.getByRole('radio', { name: 'fine' }).check();
    await page.getByRole('button', { name: /^Done, keep/ }).click();
    await expect(page.getByText(/^It sits\. It comes back on/)).toBeVisible();
    await expect(page.getByRole('heading', { name: 'Practice' })).toBeVisible();
    await expect(row).toHaveCount(before - 1);
    await expect(page.getByText(/^\d+ minutes? today\.$/)).toBeVisible();
  });
});

test('the next edition, from draft to published, with the keyboard alone where it is typed', async ({ page }) => {
  test.setTimeout(180_000);
  await signIn(page, 'ruth@saltmarsh.example.org');
  await page.goto('/ladder');
  await page.getByRole('link', { name: 'Next edition' }).click();
  await page.getByLabel('Name of the edition').press('Enter');
  await page.getByRole('link', { name: '4.3' }).click();
  const chords = page.getByRole('textbox', { name: 'Chords' });
  await chords.fill('1 13: 1-b7-3-13-9 [60-70]');
  await expect(page.getByText('This does not fit its place on the keyboard in this key.').first()).toBeVisible();
  await chords.fill('1 thirteen: 1-b7');
  await expect(page.getByText('Line 1: “thirteen” is no kind of chord.')).toBeVisible();
  await chords.fill('1 13: 1-b7-3-13-9 or 1-3-b7-9-13 [root 41-52]');
  await expect(page.getByRole('img', { name: /^1-b7-3-13-9 or 1-3-b7-9-13\. C13: C3, B♭3/ })).toBeVisible();
  await page.getByRole('textbox', { name: 'Title for teachers' }).fill('Dominant thirteenth, two stacks');
  await page.getByRole('button', { name: 'Save in the draft' }).press('Enter');
  await expect(page.getByRole('link', { name: /Dominant thirteenth, two stacks/ })).toContainText('changed');
  await page.getByRole('button', { name: 'Add a rung' }).click();
  await page.getByRole('textbox', { name: 'Code' }).fill('4.3a');
  await page.getByRole('combobox', { name: 'Behind' }).selectOption({ label: '4.3 Dominant thirteenth, two stacks' });
  await page.getByRole('combobox', { name: 'Split from' }).selectOption({ label: '4.3 Dominant thirteenth, two stacks' });
  await page.getByRole('button', { name: 'Add it' }).click();
  await page.waitForURL('**/ladder/edition/*');
  await page.getByRole('link', { name: 'All rungs' }).click();
  await page.getByRole('link', { name: 'Rehearse and publish' }).click();
  await expect(page.getByText(/Nothing passed becomes unpassed\./)).toBeVisible();
  await expect(page.getByText(/^Who gains: [1-9]/)).toBeVisible();
  await page.getByRole('button', { name: 'Publish from today' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Publish' }).click();
  await expect(page.getByText(/^Second edition: 10 levels, 38 rungs\./)).toBeVisible();
});
