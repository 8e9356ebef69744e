import type * as Vex from 'vexflow/bravura';
import type { NoteName } from '@/lib/harmony/note';
import { drawStaves, type VexFlow } from './draw-stave';

export type RowChord = { name: string; notes: readonly NoteName[] };

export const SYSTEM_HEIGHT = 222;
/** The staves bring room of their own above their lines. */
const SYMBOL_ROOM = 8;
const BAR_WIDTH = 104;
const CLEF_WIDTH = 52;
const LEFT = 22;

/** How many bars stand on one line of this width, at least one. */
export const barsInLine = (width: number): number => Math.max(1, Math.floor((width - LEFT - CLEF_WIDTH) / BAR_WIDTH));

/** Chords in a row on grand staves, a chord a bar with its symbol above; as many lines as it takes. */
export function drawChordRow(vex: VexFlow, host: HTMLDivElement, chords: readonly RowChord[], width: number): void {
  host.replaceChildren();
  const inLine = barsInLine(width);
  const lines = Math.ceil(chords.length / inLine);
  const renderer = new vex.Renderer(host, vex.Renderer.Backends.SVG);
  renderer.resize(width, lines * SYSTEM_HEIGHT);
  const pen = renderer.getContext();
  for (let line = 0; line < lines; line += 1) drawLine(vex, pen, chords.slice(line * inLine, (line + 1) * inLine), line * SYSTEM_HEIGHT);
}

function drawLine(vex: VexFlow, pen: Vex.RenderContext, chords: readonly RowChord[], top: number): void {
  let x = LEFT;
  chords.forEach(({ name, notes }, at) => {
    const width = at === 0 ? BAR_WIDTH + CLEF_WIDTH : BAR_WIDTH;
    const startX = drawStaves(vex, pen, { x, y: top + SYMBOL_ROOM, width, isFirst: at === 0 }, notes);
    pen.save();
    pen.setFont('var(--font-hanken), var(--font-music), sans-serif', 15, 'bold');
    pen.fillText(name, startX, top + 24);
    pen.restore();
    x += width;
  });
}
