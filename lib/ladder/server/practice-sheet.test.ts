import { describe, expect, it } from 'vitest';
import { ladderHouse } from '@/tests/factories/ladder-house';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { practiceSheet, practiceSheetFile } from './practice-sheet';

async function house() {
  const db = freshDb();
  return { db, ...(await ladderHouse(db)) };
}

describe('a practice sheet', () => {
  it('shows a rung in the keys that were asked, in the order of the rung', async () => {
    const { db, rungId } = await house();
    const sheet = await practiceSheet({ rungId: rungId('4.2'), keys: ['Gb', 'C', 'H'] }, contextOf(db, 'guardian'));
    expect(sheet.keys).toEqual(['C', 'Gb']);
    expect(sheet.rows.map(({ chords }) => chords.map(({ name, notes }) => `${name}: ${notes.join(' ')}`))).toEqual([['Cm11: C3 F3 Bb3 Eb4 G4'], ['F♯m11: F#3 B3 E4 A4 C#5']]);
    expect(sheet.rows[0]?.degrees).toEqual(['1 11 ♭7 ♭3 5']);
  });
  it('begins with the first three keys, and has words where nothing is played', async () => {
    const { db, rungId } = await house();
    expect((await practiceSheet({ rungId: rungId('4.1'), keys: [] }, contextOf(db, 'desk'))).keys).toEqual(['C', 'F', 'Bb']);
    const spoken = await practiceSheet({ rungId: rungId('1.1'), keys: [] }, contextOf(db, 'student', { personId: 'ines', studentIds: ['ines'] }));
    expect(spoken.rung.isPlayed).toBe(false);
    expect(spoken.rows[0]?.degrees.join('')).not.toBe('');
  });
  it('leaves as MusicXML and as MIDI, not for what is only told', async () => {
    const { db, rungId } = await house();
    const xml = await practiceSheetFile({ rungId: rungId('6.2'), keys: ['Db'], as: 'musicxml' }, contextOf(db, 'teacher'));
    expect(xml.headers.get('content-disposition')).toMatch(/6-2-two-five-one-with-stacks\.musicxml/);
    expect(await xml.text()).toContain('<fifths>-5</fifths>');
    const midi = await practiceSheetFile({ rungId: rungId('6.2'), keys: ['Db'], as: 'midi' }, contextOf(db, 'teacher'));
    expect(Buffer.from(await midi.arrayBuffer()).subarray(0, 4).toString()).toBe('MThd');
    await expect(practiceSheetFile({ rungId: rungId('1.1'), keys: [], as: 'midi' }, contextOf(db, 'teacher'))).rejects.toMatchObject({ code: 'invalid' });
    await expect(practiceSheet({ rungId: 'nowhere', keys: [] }, contextOf(db, 'teacher'))).rejects.toMatchObject({ code: 'not_found' });
  });
});
