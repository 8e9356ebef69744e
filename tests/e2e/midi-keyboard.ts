import type { Page } from '@playwright/test';

type FakeInput = { id: string; name: string; state: 'connected'; onmidimessage: ((event: { data: Uint8Array }) => void) | null };
declare global { interface Window { midiKeyboard?: FakeInput } }

/** Plugs a MIDI keyboard into the browser: the product’s own listening, the messages of a real device. */
export async function plugInKeyboard(page: Page): Promise<void> {
  await page.addInitScript(() => {
    const input: FakeInput = { id: 'one', name: 'Test keyboard', state: 'connected', onmidimessage: null };
    window.midiKeyboard = input;
    Object.defineProperty(navigator, 'requestMIDIAccess', { value: () => Promise.resolve({ inputs: new Map([[input.id, input]]), onstatechange: null }) });
  });
}

const HELD_MS = 260;

/** Puts all keys down within a few milliseconds, holds them, and lets go. */
export async function playChord(page: Page, keys: readonly number[]): Promise<void> {
  const send = (status: number, velocity: number) => page.evaluate(([list, first, second]) => {
    for (const key of list) window.midiKeyboard?.onmidimessage?.({ data: new Uint8Array([first, key, second]) });
  }, [[...keys], status, velocity] as const);
  await send(0x90, 64);
  await page.waitForTimeout(HELD_MS);
  await send(0x80, 0);
}

const STEPS: Record<string, number> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };

/** The keys of a drawn chord from what it tells a screen reader: "D♭maj9: D♭3, F3, C4, E♭4, A♭4". */
export function keysNamed(label: string): number[] {
  const names = label.slice(label.lastIndexOf(': ') + 2).split(', ');
  return names.map((name) => {
    const [, letter = 'C', signs = '', octave = '4'] = /^([A-G])([♭♯]*)(-?\d)$/.exec(name) ?? [];
    const shift = signs.startsWith('♭') ? -signs.length : signs.length;
    return (Number(octave) + 1) * 12 + (STEPS[letter] ?? 0) + shift;
  });
}
