import type { LevelSeed } from '../play-spec';
import { ask, DOMINANT_ROOT, inTime, K12, single, STACK_ROOT, voicing, WIDE_WINDOW, within } from './parts';

const stack = { rootRegister: STACK_ROOT };
const dominant = { rootRegister: DOMINANT_ROOT };
const wide = { register: WIDE_WINDOW };

export const LEVEL_7: LevelSeed = {
  no: 7, title: 'Altered dominants', shortTitle: 'Altered', plainTitle: 'Chords with spice',
  rungs: [
    { code: '7.1', title: 'Altered stack', plainTitle: 'The spicy full chord', canDo: 'play the darkest, most urgent of the full chords in all twelve keys',
      soundsLike: 'A storm cloud that asks to be resolved.',
      spec: voicing(single('7b9b13', ['1-b7-3-b13-b9'], dominant)), criteria: within(5, 'Both altered notes speak.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['6.4'] },
    { code: '7.2', title: 'Altered rootless', plainTitle: 'Spice in one hand', canDo: 'play two kinds of spicy chord with the left hand alone',
      soundsLike: 'Dark chocolate with a pinch of salt.',
      spec: voicing([...single('7b9b13', ['3-b13-b7-b9'], wide), ...single('7#9b13', ['3-b13-b7-#9'], wide)]),
      criteria: within(5, 'No root: the bass has it.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.1'] },
    { code: '7.3', title: 'Two-five-one altered, top by half steps', plainTitle: 'A melting homecoming', canDo: 'lead every key home so that the top note melts down by half steps',
      soundsLike: 'Wax running down a candle.',
      spec: voicing([[ask('2', 'm11', '1-11-b7-b3-5', stack), ask('5', '7b9b13', '1-b7-3-b13-b9', dominant), ask('1', 'maj9', '1-3-7-9-5', stack)]]),
      criteria: inTime(72, 4, 'The top line falls by half steps and is heard as a line.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.1'] },
    { code: '7.4', title: 'Choose the colour', plainTitle: 'Choosing the right spice', canDo: 'hear where a chord wants to go and pick the colour that suits it',
      soundsLike: 'The same question asked in four tones of voice.',
      spec: { how: 'free', turns: ['13', '13b9', '7#11', '7alt'].map((suffix) => [ask('1', suffix, [])]) },
      criteria: { slipsPerTurn: 0, isShuffled: false, listenFor: 'Asked why, the student names the chord it leads to.' }, keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.2', '7.3'] },
  ],
};

export const LEVEL_8: LevelSeed = {
  no: 8, title: 'Minor two-five-one', shortTitle: 'Minor', plainTitle: 'Coming home in a minor key',
  rungs: [
    { code: '8.1', title: 'Half-diminished forms', plainTitle: 'The wistful chord', canDo: 'play the wistful half-diminished chord in all twelve keys',
      soundsLike: 'A question asked very quietly.',
      spec: voicing(single('m7b5', ['b3-b5-b7-1', 'b7-1-b3-b5'], wide)), criteria: within(5, 'The flat five is heard.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.4'] },
    { code: '8.2', title: 'Tonic minor', plainTitle: 'Minor as a place to rest', canDo: 'play two minor chords that can end a piece',
      soundsLike: 'The last shot of an old black-and-white film.',
      spec: voicing([...single('m6/9', ['b3-5-6-9'], wide), ...single('m(maj7)', ['b3-5-7-9'], wide)]), criteria: within(5, 'It sounds finished, not waiting.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['7.4'] },
    { code: '8.3', title: 'Minor cadence', plainTitle: 'The minor homecoming', canDo: 'lead every minor key home with three dark, close chords',
      soundsLike: 'A door closed gently on a sad story.',
      spec: voicing([
        [ask('2', 'm7b5', 'b3-b5-b7-1', wide), ask('5', '7b9b13', 'b7-b9-3-b13', wide), ask('1', 'm6/9', 'b3-5-6-9', wide)],
        [ask('2', 'm7b5', 'b7-1-b3-b5', wide), ask('5', '7b9b13', '3-b13-b7-b9', wide), ask('1', 'm6/9', '6-9-b3-5', wide)]]),
      criteria: inTime(72, 4, 'The voices move as little as they can.'), keyPool: K12, keysDrawn: 12, keysNeeded: 10, must: ['8.1', '8.2'] },
  ],
};
