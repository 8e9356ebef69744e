import type * as Vex from 'vexflow/bravura';
import { keyOf, type NoteName } from '@/lib/harmony/note';

export type VexFlow = typeof Vex;
export const STAVE_HEIGHT = 210;
const LEFT = 26;
const TREBLE_TOP = 4;
const BASS_TOP = 94;
const MIDDLE_C = 60;
const MOST_DRAWN_SIGNS = 2;

/** One chord in whole notes on a grand stave: middle C and above in the treble, the rest in the bass. */
export function drawGrandStave(vex: VexFlow, host: HTMLDivElement, notes: readonly NoteName[], width: number): void {
  host.replaceChildren();
  const renderer = new vex.Renderer(host, vex.Renderer.Backends.SVG);
  renderer.resize(width, STAVE_HEIGHT);
  drawStaves(vex, renderer.getContext(), { x: LEFT, y: 0, width: width - LEFT - 2, isFirst: true }, notes);
}

type Place = { x: number; y: number; width: number; /** with brace and clefs */ isFirst: boolean };

/** A bar on two staves; answers where its notes begin. */
export function drawStaves(vex: VexFlow, pen: Vex.RenderContext, { x, y, width, isFirst }: Place, notes: readonly NoteName[]): number {
  const [treble, bass] = [new vex.Stave(x, y + TREBLE_TOP, width), new vex.Stave(x, y + BASS_TOP, width)];
  if (isFirst) { treble.addClef('treble'); bass.addClef('bass'); }
  for (const stave of [treble, bass]) stave.setContext(pen).draw();
  for (const kind of isFirst ? (['brace', 'singleLeft', 'singleRight'] as const) : (['singleRight'] as const)) new vex.StaveConnector(treble, bass).setType(kind).setContext(pen).draw();
  const sorted = [...notes].sort((a, b) => keyOf(a) - keyOf(b));
  const startX = Math.max(treble.getNoteStartX(), bass.getNoteStartX());
  for (const [stave, clef, part] of [[treble, 'treble', sorted.filter((note) => keyOf(note) >= MIDDLE_C)], [bass, 'bass', sorted.filter((note) => keyOf(note) < MIDDLE_C)]] as const) {
    stave.setNoteStartX(startX);
    if (part.length > 0) vex.Formatter.FormatAndDraw(pen, stave, [chordNote(vex, clef, part)]);
  }
  return startX;
}

function chordNote(vex: VexFlow, clef: 'treble' | 'bass', notes: readonly NoteName[]) {
  const parts = notes.map((note) => /^([A-G])(b*|#*)(-?\d+)$/.exec(note) ?? ['', 'C', '', '4']);
  const chord = new vex.StaveNote({ clef, keys: parts.map(([, letter = 'c', , octave = '4']) => `${letter.toLowerCase()}/${octave}`), duration: 'w' });
  parts.forEach(([, , signs = ''], at) => {
    if (signs !== '' && signs.length <= MOST_DRAWN_SIGNS) chord.addModifier(new vex.Accidental(signs), at);
  });
  return chord;
}
