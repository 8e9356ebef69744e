import type { Chord } from './chord';
import type { Degree } from './degree';

/**
 * The ways players voice a chord, from the bottom up. Shell: root, third and seventh. Guide tones: third and
 * seventh. Stack: five notes for two hands. Rootless A and B: third or seventh lowest, the root left to the bass.
 * Close position and its inversions; drop 2: the second voice from the top an octave lower (Terefenko, Jazz Theory,
 * p. 47). Forms A and B after the companion site to Tymoczko, ch. 10; the stacks are the school's own.
 */
export const FORMS = {
  shell: 'Shell', shell_open: 'Open shell', guide_tones: 'Guide tones', stack: 'Five-note stack', rootless_a: 'Rootless A', rootless_b: 'Rootless B', close: 'Close position', drop_2: 'Drop 2',
} as const;
export type FormName = keyof typeof FORMS;
export const FORM_NAMES = Object.keys(FORMS) as FormName[];

/** The degree of a chord that takes each part in a form. */
type Parts = { third: Degree; fifth: Degree; seventh: Degree; colour: Degree; ninth: Degree };

type Has = Pick<Chord, 'degrees' | 'isAlt'>;
const firstOf = ({ degrees }: Has, wanted: readonly Degree[]): Degree | null => wanted.find((degree) => degrees.includes(degree)) ?? null;
const isDominant = ({ degrees }: Has): boolean => degrees.includes('b7') && (degrees.includes('3') || degrees.includes('4'));

/**
 * Who plays which part. A dominant takes its 13 for the fifth and an altered one the flat 13 and flat 9; a
 * half-diminished or diminished chord keeps its root in place of a ninth, which would clash. Null for a chord
 * without third or seventh: it has no such form.
 */
function partsOf(chord: Has): Parts | null {
  const third = firstOf(chord, ['3', 'b3', '4', '2']);
  const seventh = firstOf(chord, ['7', 'b7', 'bb7', '6']);
  if (!third || !seventh) return null;
  const fifth = firstOf(chord, ['b5', '#5', '5']) ?? '5';
  const isFlatFive = third === 'b3' && fifth === 'b5';
  return { third, seventh, fifth, colour: colourOf(chord, fifth), ninth: isFlatFive ? '1' : ninthOf(chord) };
}

function colourOf(chord: Has, fifth: Degree): Degree {
  if (!isDominant(chord)) return fifth;
  if (chord.isAlt) return 'b13';
  if (fifth !== '5') return fifth;
  return firstOf(chord, ['b13', '13']) ?? (firstOf(chord, ['b9', '#9']) ? 'b13' : '13');
}

function ninthOf(chord: Has): Degree {
  if (chord.isAlt) return 'b9';
  return firstOf(chord, ['b9', '#9', '9']) ?? (isDominant(chord) && chord.degrees.includes('b13') ? 'b9' : '9');
}

const rotations = (stack: readonly Degree[]): Degree[][] => stack.map((_degree, at) => [...stack.slice(at), ...stack.slice(0, at)]);
/** The second voice from the top goes to the bottom. */
const dropSecond = (stack: readonly Degree[]): Degree[] => [...stack.slice(-2, -1), ...stack.slice(0, -2), ...stack.slice(-1)];

const SHAPES: Record<FormName, (parts: Parts, chord: Has) => Degree[][]> = {
  shell: ({ third, seventh }) => [['1', third, seventh]],
  shell_open: ({ third, seventh }) => [['1', seventh, third]],
  guide_tones: ({ third, seventh }) => [[third, seventh], [seventh, third]],
  stack: (parts, chord) => [stackOf(parts, chord)],
  rootless_a: ({ third, colour, seventh, ninth }) => [[third, colour, seventh, ninth]],
  rootless_b: ({ third, colour, seventh, ninth }) => [[seventh, ninth, third, colour]],
  close: ({ third, fifth, seventh }) => rotations(['1', third, fifth, seventh]),
  drop_2: ({ third, fifth, seventh }) => rotations(['1', third, fifth, seventh]).map(dropSecond),
};

function stackOf({ third, fifth, seventh, colour, ninth }: Parts, chord: Has): Degree[] {
  if (ninth === '1') return ['1', fifth, seventh, third];
  if (isDominant(chord)) return ['1', seventh, third, colour, ninth];
  return third === 'b3' && seventh === 'b7' ? ['1', '11', seventh, third, fifth] : ['1', third, seventh, ninth, fifth];
}

/** The stacks of degrees in which a chord may be played in this form; none when it has no third or seventh. */
export function stacksOfForm(chord: Has, form: FormName): Degree[][] {
  const parts = partsOf(chord);
  if (parts) return SHAPES[form](parts, chord);
  return form === 'close' ? rotations(chord.degrees) : [];
}
