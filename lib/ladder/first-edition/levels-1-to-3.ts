import type { AskedChord, LevelSeed } from '../play-spec';
import { ask, DOMINANT_ROOT, inTime, K12, K3, K7, SHELL_ROOT, single, STACK_ROOT, voicing, WIDE_WINDOW, within } from './parts';

const shell = { rootRegister: SHELL_ROOT };
const guide = { register: WIDE_WINDOW };

/** The seventh chords on the seven steps of C major. */
const C_DIATONIC: AskedChord[][] = [
  [ask('1', 'maj7', [])], [ask('2', 'm7', [])], [ask('3', 'm7', [])], [ask('4', 'maj7', [])], [ask('5', '7', [])], [ask('6', 'm7', [])], [ask('7', 'm7b5', [])],
];
const THREE_SHELLS: AskedChord[][] = [
  ...single('maj7', ['1-3-7', '1-7-3'], shell), ...single('m7', ['1-b3-b7', '1-b7-b3'], shell), ...single('7', ['1-3-b7', '1-b7-3'], shell),
];
/** The flat five defines a half-diminished and a diminished chord, so it stays in the shell. */
const SIX_SHELLS: AskedChord[][] = [
  ...THREE_SHELLS, ...single('m7b5', ['1-b5-b7-b3', '1-b7-b3-b5'], shell), ...single('dim7', ['1-b5-bb7-b3', '1-bb7-b3-b5'], shell), ...single('6', ['1-3-6', '1-6-3'], shell),
];
const GUIDE_CADENCES: AskedChord[][] = [
  [ask('2', 'm7', 'b7-b3', guide), ask('5', '7', '3-b7', guide), ask('1', 'maj7', '7-3', guide)],
  [ask('2', 'm7', 'b3-b7', guide), ask('5', '7', 'b7-3', guide), ask('1', 'maj7', '3-7', guide)],
];

export const LEVEL_1: LevelSeed = {
  no: 1, title: 'First chords in C', shortTitle: 'First', plainTitle: 'First rich chords, all around C',
  rungs: [
    { code: '1.1', title: 'Spell the seven seventh chords of C', plainTitle: 'Naming the notes of seven chords',
      canDo: 'name the four notes of every basic chord in C', soundsLike: 'Nothing is played yet: it is the alphabet from which the chords are built.',
      spec: { how: 'spell', turns: C_DIATONIC },
      criteria: within(8, 'Each letter said aloud, from the root up.'), keyPool: ['C'], keysDrawn: 7, keysNeeded: 7, must: [] },
    { code: '1.2', title: 'Shells 1-3-7 and 1-7-3', plainTitle: 'Three-note chords', canDo: 'play the three notes that make a chord what it is, in three keys',
      soundsLike: 'Lean and clear, like the accompaniment of an old song with nothing in the way.',
      spec: voicing(THREE_SHELLS), criteria: within(6, 'The root is the lowest note.'), keyPool: K3, keysDrawn: 9, keysNeeded: 8, must: ['1.1'] },
    { code: '1.3', title: 'Say what may be added', plainTitle: 'Choosing a colour', canDo: 'say which extra notes make a chord richer and which would clash',
      soundsLike: 'Like tasting a sauce and knowing which spice suits it.',
      spec: { how: 'name_tensions', turns: [[ask('1', 'maj7', [])], [ask('2', 'm7', [])], [ask('5', '7', [])]] },
      criteria: within(15, 'The reason too: a natural 11 lies a half step above a major third.'), keyPool: ['C'], keysDrawn: 3, keysNeeded: 3, must: ['1.1'] },
    { code: '1.4', title: 'Three stacks in C', plainTitle: 'The first three big chords', canDo: 'play three full five-note chords with both hands',
      soundsLike: 'Wide and warm, the sound people mean when they say “jazz piano”.',
      spec: voicing([[ask('1', 'maj9', '1-3-7-9-5', { rootRegister: STACK_ROOT })], [ask('2', 'm11', '1-11-b7-b3-5', { rootRegister: STACK_ROOT })],
        [ask('5', '13', '1-b7-3-13-9', { rootRegister: DOMINANT_ROOT })]]),
      criteria: within(6, 'All five notes sound together.'), keyPool: ['C'], keysDrawn: 3, keysNeeded: 3, must: ['1.2', '1.3'] },
    { code: '1.5', title: 'Two-five-one in C, top line falling', plainTitle: 'Three chords that lead home', canDo: 'link three big chords so that the top note steps gently down',
      soundsLike: 'A sigh in three chords: tension, more tension, rest.',
      spec: voicing([[ask('2', 'm11', '1-11-b7-b3-5', { rootRegister: STACK_ROOT }), ask('5', '7b9b13', '1-b7-3-b13-b9', { rootRegister: DOMINANT_ROOT }),
        ask('1', 'maj9', '1-3-7-9-5', { rootRegister: STACK_ROOT })]]),
      criteria: inTime(60, 4, 'The top line A, A♭, G falls without a bump.'), keyPool: ['C'], keysDrawn: 2, keysNeeded: 2, must: ['1.4'] },
  ],
};

export const LEVEL_2: LevelSeed = {
  no: 2, title: 'Shells round the cycle', shortTitle: 'Shells', plainTitle: 'Three-note chords in every key',
  rungs: [
    { code: '2.1', title: 'Shells in seven keys', plainTitle: 'Three-note chords in seven keys', canDo: 'find three kinds of chord in seven keys without stopping to think',
      soundsLike: 'The skeleton of almost any song, steady and sure.',
      spec: voicing(THREE_SHELLS), criteria: within(5, 'No searching between the keys.'), keyPool: K7, keysDrawn: 21, keysNeeded: 21, must: ['1.5'] },
    { code: '2.2', title: 'Six kinds of shell in twelve keys', plainTitle: 'Six kinds of chord in every key', canDo: 'play six kinds of chord in all twelve keys',
      soundsLike: 'Bright, dark, restless and settled: six moods from few notes.',
      spec: voicing(SIX_SHELLS), criteria: within(4, 'The flat five is there where the chord has one.'), keyPool: K12, keysDrawn: 25, keysNeeded: 24, must: ['2.1'] },
    { code: '2.3', title: 'Shells shuffled', plainTitle: 'Any chord, any key, at once', canDo: 'play any of six kinds of chord in any key the moment it is called',
      soundsLike: 'Like speaking: the word is there when it is needed.',
      spec: voicing(SIX_SHELLS), criteria: { ...within(3, 'Hands go straight to the keys.'), isShuffled: true }, keyPool: K12, keysDrawn: 25, keysNeeded: 24, must: ['2.2'] },
  ],
};

export const LEVEL_3: LevelSeed = {
  no: 3, title: 'Guide tones', shortTitle: 'Guides', plainTitle: 'The two notes that lead the ear',
  rungs: [
    { code: '3.1', title: 'Third and seventh, two voices', plainTitle: 'Two notes that tell the story', canDo: 'lead the ear through three chords with only two notes each',
      soundsLike: 'Two quiet voices walking hand in hand.',
      spec: voicing(GUIDE_CADENCES), criteria: inTime(60, 4, 'Each seventh falls to the next third.'), keyPool: K7, keysDrawn: 7, keysNeeded: 6, must: ['2.3'] },
    { code: '3.2', title: 'Two-five-one guide tones in twelve keys', plainTitle: 'Two leading notes in every key', canDo: 'do the same in all twelve keys, the notes hardly moving',
      soundsLike: 'So smooth that one hardly notices the chord has changed.',
      spec: voicing(GUIDE_CADENCES), criteria: inTime(72, 4, 'No voice moves more than a half step.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['3.1'] },
    { code: '3.3', title: 'Cycle of dominants', plainTitle: 'Sliding chords', canDo: 'let a chain of chords slide down by the smallest step',
      soundsLike: 'A slow slide down a banister, one notch at a time.',
      spec: voicing([['3-b7', 'b7-3', '3-b7', 'b7-3'], ['b7-3', '3-b7', 'b7-3', '3-b7']].map((stacks) =>
        (['1', '4', 'b7', 'b3'] as const).map((step, at) => ask(step, '7', stacks[at] ?? '', guide)))),
      criteria: inTime(80, 4, 'Both voices fall a half step each time.'), keyPool: K12, keysDrawn: 6, keysNeeded: 5, must: ['3.1'] },
  ],
};
