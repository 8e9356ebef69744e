import { Chord } from 'tonal';
import { bench, describe } from 'vitest';
import { chordOf } from '../../lib/harmony/chord';
import { judge } from '../../lib/harmony/judge';
import { smoothestVoicings, type PathLimits } from '../../lib/harmony/path-finder';
import { readingsOf } from '../../lib/harmony/readings';
import { chordsOfNumerals, PROGRESSIONS } from '../../lib/harmony/roman';
import { targetOf } from '../../lib/harmony/target';

/** Side by side in one run: aims are 0.1 ms a judged set, 20 ms for a 32-bar form with six forms a chord, naming ten times faster than tonal's detection. */
const SETS = [[48, 52, 59, 62, 67], [43, 53, 59, 64, 69], [50, 55, 60, 65, 69], [53, 57, 60, 64], [53, 57, 59, 64], [52, 55, 59, 62]];
const NAMES = ['C', 'Db', 'D', 'Eb', 'E', 'F', 'Gb', 'G', 'Ab', 'A', 'Bb', 'B'];
const NAMED_SETS = SETS.map((set) => set.map((key) => `${NAMES[key % 12] ?? ''}${Math.floor(key / 12) - 1}`));

describe('a name for what sounds, six sets', () => {
  bench('ours', () => { for (const set of SETS) readingsOf(set); });
  bench('tonal detection', () => { for (const set of NAMED_SETS) Chord.detect(set); });
});

const target = targetOf({ symbol: 'Cmaj9', stack: '1-3-7-9-5', rootRegister: { lowest: 47, highest: 58 } });
describe('a set against what was asked', () => {
  bench('exact', () => { judge(target, [48, 52, 59, 62, 67]); });
  bench('wrong, with its sentences', () => { judge(target, [48, 53, 58, 62, 67]); });
  const free = targetOf({ symbol: 'G7alt' });
  bench('any voicing', () => { judge(free, [43, 53, 59, 63]); });
});

const LIMITS: PathLimits = { forms: ['rootless_a', 'rootless_b', 'stack', 'shell', 'shell_open', 'drop_2'], register: { lowest: 41, highest: 77 } };
const blues = PROGRESSIONS.blues.numerals;
const FORM = [...blues, ...blues, ...blues.slice(0, 8)].map((numeral) => chordsOfNumerals('F', [numeral])[0] ?? chordOf('F7'));
describe('the smoothest path', () => {
  bench('32 bars, six forms a chord', () => { smoothestVoicings(FORM, LIMITS); });
});
