import type { AskedChord, LevelSeed } from '../play-spec';
import { ask, CADENCE_ROOT, DOMINANT_ROOT, inTime, K12, single, STACK_ROOT, voicing, WIDE_WINDOW, within } from './parts';

const stack = { rootRegister: STACK_ROOT };
const dominant = { rootRegister: DOMINANT_ROOT };
const wide = { register: WIDE_WINDOW };
/** So narrow that mostly one form fits: the student has to choose. */
const switching = { register: { lowest: 52, highest: 69 } };
const cadence = { rootRegister: CADENCE_ROOT };

/** Rootless two-five-one: forms A-B-A and B-A-B. */
const ROOTLESS_CADENCES: AskedChord[][] = [
  [ask('2', 'm9', 'b3-5-b7-9', wide), ask('5', '13', 'b7-9-3-13', wide), ask('1', 'maj9', '3-5-7-9', wide)],
  [ask('2', 'm9', 'b7-9-b3-5', wide), ask('5', '13', '3-13-b7-9', wide), ask('1', 'maj9', '7-9-3-5', wide)],
];
/** The tonic turns minor and begins the next cadence a whole step lower. */
const WHOLE_STEP_DOWN: AskedChord[][] = [
  [...(ROOTLESS_CADENCES[0] ?? []), ask('1', 'm9', 'b3-5-b7-9', wide), ask('4', '13', 'b7-9-3-13', wide), ask('b7', 'maj9', '3-5-7-9', wide)],
  [...(ROOTLESS_CADENCES[1] ?? []), ask('1', 'm9', 'b7-9-b3-5', wide), ask('4', '13', '3-13-b7-9', wide), ask('b7', 'maj9', '7-9-3-5', wide)],
];

export const LEVEL_4: LevelSeed = {
  no: 4, title: 'Five-note stacks', shortTitle: 'Stacks', plainTitle: 'Full chords for two hands',
  rungs: [
    { code: '4.1', title: 'Major ninth stack', plainTitle: 'The full major ninth chord', canDo: 'play a full major ninth chord in all twelve keys',
      soundsLike: 'Open and sunny, the last chord of a happy evening.',
      spec: voicing(single('maj9', ['1-3-7-9-5'], stack)), criteria: within(5, 'An even touch, no note sticking out.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['2.3'] },
    { code: '4.2', title: 'Minor fourth stack', plainTitle: 'The minor chord built of fourths', canDo: 'play a wide minor chord built of fourths in all twelve keys',
      soundsLike: 'Cool and spacious, like a street at night after rain.',
      spec: voicing(single('m11', ['1-11-b7-b3-5'], stack)), criteria: within(5, 'An even touch, no note sticking out.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['2.3'] },
    { code: '4.3', title: 'Dominant thirteenth stack', plainTitle: 'The thirteenth chord', canDo: 'play the rich thirteenth chord in all twelve keys',
      soundsLike: 'Full of expectation, the chord just before the curtain rises.',
      spec: voicing(single('13', ['1-b7-3-13-9'], dominant)), criteria: within(5, 'Bass and colours in balance.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['2.3'] },
    { code: '4.4', title: 'Leave the avoid note out', plainTitle: 'Hearing the note that clashes', canDo: 'build chords freely and leave out the one note that would clash',
      soundsLike: 'Always sweet, because the sour note is known and skipped.',
      spec: { how: 'free', turns: [[ask('1', 'maj7', [])], [ask('1', '7', [])], [ask('1', 'm7', [])]] },
      criteria: within(8, 'Asked afterwards, the student names the avoid note.'), keyPool: K12, keysDrawn: 24, keysNeeded: 24, must: ['4.1', '4.2', '4.3'] },
  ],
};

export const LEVEL_5: LevelSeed = {
  no: 5, title: 'Rootless A and B', shortTitle: 'Rootless', plainTitle: 'Chords for playing with a bass player',
  rungs: [
    { code: '5.1', title: 'A forms', plainTitle: 'Rich chords in one hand', canDo: 'play rich four-note chords with the left hand alone',
      soundsLike: 'The soft cushion under a singer while the bass plays below.',
      spec: voicing([...single('m9', ['b3-5-b7-9'], wide), ...single('maj9', ['3-5-7-9'], wide), ...single('13', ['3-13-b7-9'], wide)]),
      criteria: within(5, 'No root: the bass has it.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['3.2', '3.3'] },
    { code: '5.2', title: 'B forms', plainTitle: 'The same chords, second shape', canDo: 'play the same chords in a second shape, nearer to hand in other keys',
      soundsLike: 'The same colours seen from the other window.',
      spec: voicing([...single('m9', ['b7-9-b3-5'], wide), ...single('maj9', ['7-9-3-5'], wide), ...single('13', ['b7-9-3-13'], wide)]),
      criteria: within(5, 'No root: the bass has it.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['5.1'] },
    { code: '5.3', title: 'Switch A and B by register', plainTitle: 'Choosing the nearer shape', canDo: 'choose the shape that lies best, so that the hand hardly travels',
      soundsLike: 'Calm: the hand stays put while the harmony moves.',
      spec: voicing([[ask('1', 'm9', ['b3-5-b7-9', 'b7-9-b3-5'], switching)], [ask('1', 'maj9', ['3-5-7-9', '7-9-3-5'], switching)], [ask('1', '13', ['3-13-b7-9', 'b7-9-3-13'], switching)]]),
      criteria: within(4, 'The student says which form it is.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['5.2'] },
  ],
};

export const LEVEL_6: LevelSeed = {
  no: 6, title: 'Two-five-one in twelve keys', shortTitle: 'Cadences', plainTitle: 'The three chords that end most songs, in every key',
  rungs: [
    { code: '6.1', title: 'Two-five-one with shells', plainTitle: 'Coming home, three notes at a time', canDo: 'lead any of the twelve keys home with three-note chords',
      soundsLike: 'Plain and certain, like the last line of a good story.',
      spec: voicing([
        [ask('2', 'm7', '1-b3-b7', cadence), ask('5', '7', '1-b7-3', cadence), ask('1', 'maj7', '1-3-7', cadence)],
        [ask('2', 'm7', '1-b7-b3', cadence), ask('5', '7', '1-3-b7', cadence), ask('1', 'maj7', '1-7-3', cadence)]]),
      criteria: inTime(80, 4, 'Above the bass only half steps.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['4.4', '5.3'] },
    { code: '6.2', title: 'Two-five-one with stacks', plainTitle: 'Coming home with full chords', canDo: 'lead every key home with full two-handed chords',
      soundsLike: 'A whole band at rest in one pair of hands.',
      spec: voicing([[ask('2', 'm11', '1-11-b7-b3-5', stack), ask('5', '13', '1-b7-3-13-9', dominant), ask('1', 'maj9', '1-3-7-9-5', stack)]]),
      criteria: inTime(72, 4, 'The upper voices keep close.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['6.1'] },
    { code: '6.3', title: 'Two-five-one rootless', plainTitle: 'Coming home with one hand', canDo: 'lead every key home with the left hand while the right is free to play',
      soundsLike: 'Smooth as a drawer that closes by itself.',
      spec: voicing(ROOTLESS_CADENCES), criteria: inTime(80, 2, 'A-B-A or B-A-B, no leap.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['6.1'] },
    { code: '6.4', title: 'Cadences down by whole steps', plainTitle: 'One homecoming leads to the next', canDo: 'carry the three chords from one key into the next without a break',
      soundsLike: 'Steps down a wide staircase, each landing the start of the next flight.',
      spec: voicing(WHOLE_STEP_DOWN), criteria: inTime(100, 4, 'No single voice moves more than four half steps.'), keyPool: K12, keysDrawn: 6, keysNeeded: 5, must: ['6.2', '6.3'] },
  ],
};
