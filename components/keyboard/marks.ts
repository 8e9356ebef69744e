import { degreeWords, printedDegree, type VoicedNote } from '@/lib/harmony/degree';
import { spokenNote, type KeyNumber } from '@/lib/harmony/note';
import { roleOf } from '@/lib/harmony/tones';
import type { KeyMark } from './keyboard';

/** The degrees of a voicing as marks on its keys: root and fifth in ink, guide tones in brass, colours in petrol. */
export function marksOf(notes: readonly VoicedNote[]): Map<KeyNumber, KeyMark> {
  return new Map(notes.map(({ degree, note, key }): [KeyNumber, KeyMark] => {
    const role = roleOf(degree);
    const look = role === 'colour' ? 'tension' : role === 'guide' ? 'colour' : 'frame';
    return [key, { text: printedDegree(degree), role: look, spoken: `${degreeWords(degree)}, ${spokenNote(note)}` }];
  }));
}
