import type { AskedChord, LevelSeed } from '../play-spec';
import { ask, inTime, K12, K7, LEAD_TOP, single, voicing, WIDE_WINDOW, within } from './parts';

const top = { topRegister: { lowest: 60, highest: 77 } };
const lead = { topRegister: LEAD_TOP };
const wide = { register: WIDE_WINDOW };

const FOUR_NOTES: Record<string, [string, string, string, string]> = {
  maj7: ['1', '3', '5', '7'], '6': ['1', '3', '5', '6'], m7: ['1', 'b3', '5', 'b7'], '7': ['1', '3', '5', 'b7'],
};
const INVERSIONS = [[0, 1, 2, 3], [1, 2, 3, 0], [2, 3, 0, 1], [3, 0, 1, 2]];
const stacked = (suffix: string, order: readonly number[]) => order.map((at) => FOUR_NOTES[suffix]?.[at] ?? '').join('-');
const close = (suffix: string) => INVERSIONS.map((order) => stacked(suffix, order));
/** The second voice from the top dropped an octave. */
const dropTwo = (suffix: string) => INVERSIONS.map(([a = 0, b = 0, c = 0, d = 0]) => stacked(suffix, [c, a, b, d]));

const KINDS = ['maj7', '6', 'm7', '7'];
const dominantForms = ['3-13-b7-9', 'b7-9-3-13'];
const majorForms = ['3-5-7-9', '7-9-3-5'];
const minorForms = ['b3-5-b7-9', 'b7-9-b3-5'];

/** The first five notes of the scale on top, sixth chords on 1, 3 and 5, passing diminished between. */
const TOP_LINE: AskedChord[] = [
  ask('1', '6', '6-3-5-1', lead), ask('7', 'dim7', '1-b5-bb7-b3', lead), ask('1', '6', '1-5-6-3', lead), ask('7', 'dim7', 'b3-bb7-1-b5', lead), ask('1', '6', '3-6-1-5', lead),
];
const thirteenth = (step: AskedChord['step']) => ask(step, '13', dominantForms, wide);
const tonic = ask('1', 'maj9', majorForms, wide);
const BLUES: AskedChord[] = [
  ...(['1', '4', '1', '1', '4', '4', '1'] as const).map(thirteenth), ask('6', '7b9b13', ['3-b13-b7-b9', 'b7-b9-3-b13'], wide), ask('2', 'm9', minorForms, wide), ...(['5', '1', '5'] as const).map(thirteenth),
];

export const LEVEL_9: LevelSeed = {
  no: 9, title: 'Drop 2', shortTitle: 'Open', plainTitle: 'Melody on top, the chord spread below',
  rungs: [
    { code: '9.1', title: 'Close position, four inversions', plainTitle: 'One chord, four ways up', canDo: 'turn a chord upside down in four ways, in seven keys',
      soundsLike: 'The same four friends in a different order on the bench.',
      spec: voicing(KINDS.flatMap((suffix) => single(suffix, close(suffix), top))), criteria: within(5, 'The student says which note is on top.'), keyPool: K7, keysDrawn: 14, keysNeeded: 12, must: ['2.3'] },
    { code: '9.2', title: 'Drop 2, four inversions', plainTitle: 'Opening the chord', canDo: 'open a chord out so that its top note sings',
      soundsLike: 'Windows opened in a small room.',
      spec: voicing(KINDS.flatMap((suffix) => single(suffix, dropTwo(suffix), lead))), criteria: within(5, 'The top note sings.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['9.1'] },
    { code: '9.3', title: 'A top line in block chords', plainTitle: 'Every melody note its own chord', canDo: 'put a full chord under every note of a melody',
      soundsLike: 'A choir of four that moves as one.',
      spec: voicing([TOP_LINE]), criteria: inTime(60, 2, 'The top line is connected; no gap wider than an octave.'), keyPool: K12, keysDrawn: 6, keysNeeded: 5, must: ['9.2'] },
    { code: '9.4', title: 'Two-five-one in drop 2', plainTitle: 'A singing homecoming', canDo: 'lead every key home with open chords under a singing top note',
      soundsLike: 'A small string section in two hands.',
      spec: voicing([[ask('2', 'm7', dropTwo('m7'), lead), ask('5', '7', dropTwo('7'), lead), ask('1', 'maj7', dropTwo('maj7'), lead)]]),
      criteria: inTime(72, 4, 'The nearest inversion each time.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['9.2', '6.4'], should: ['9.3'] },
  ],
};

export const LEVEL_10: LevelSeed = {
  no: 10, title: 'Substitutes and forms', shortTitle: 'Forms', plainTitle: 'Detours and whole pieces',
  rungs: [
    { code: '10.1', title: 'Find the substitute', plainTitle: 'Two chords, one heart', canDo: 'find the far-away chord that shares the same two key notes',
      soundsLike: 'A secret door between two distant rooms.',
      spec: voicing([[ask('1', '7', '3-b7', wide), ask('b5', '7', 'b7-3', wide)], [ask('1', '7', 'b7-3', wide), ask('b5', '7', '3-b7', wide)]]),
      criteria: within(4, 'The hand does not move; the student names the second chord.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['3.2', '3.3'] },
    { code: '10.2', title: 'Two, flat two, one', plainTitle: 'Home by the back stairs', canDo: 'come home by a surprising chord that slides down a half step',
      soundsLike: 'A sideways glance before the smile.',
      spec: voicing([
        [ask('2', 'm9', 'b3-5-b7-9', wide), ask('b9', '13', '3-13-b7-9', wide), ask('1', 'maj9', '3-5-7-9', wide)],
        [ask('2', 'm9', 'b7-9-b3-5', wide), ask('b9', '13', 'b7-9-3-13', wide), ask('1', 'maj9', '7-9-3-5', wide)]]),
      criteria: inTime(72, 4, 'The top falls by half steps.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.4', '10.1'] },
    { code: '10.3', title: 'Turnarounds', plainTitle: 'Round and back to the top', canDo: 'turn the end of a song back to its beginning',
      soundsLike: 'A merry-go-round that always arrives where it set out.',
      spec: voicing([
        [tonic, ask('6', '7b9b13', ['3-b13-b7-b9', 'b7-b9-3-b13'], wide), ask('2', 'm9', minorForms, wide), thirteenth('5'), tonic],
        [thirteenth('3'), thirteenth('b3'), thirteenth('2'), thirteenth('b9'), tonic]]),
      criteria: inTime(80, 2, 'The hand keeps close; the line never stops.'), keyPool: K7, keysDrawn: 7, keysNeeded: 6, must: ['10.2', '8.3'] },
    { code: '10.4', title: 'Twelve-bar blues', plainTitle: 'A whole blues', canDo: 'accompany a whole twelve-bar blues',
      soundsLike: 'Late evening, a small stage, a tapping foot.',
      spec: voicing([BLUES]), criteria: { ...inTime(80, 4, 'The form is kept: the student always knows the bar.'), slipsPerTurn: 1 }, keyPool: ['F', 'Bb', 'C'], keysDrawn: 3, keysNeeded: 2, must: ['10.3'] },
  ],
};
