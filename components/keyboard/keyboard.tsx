'use client';

import { useState, type KeyboardEvent, type PointerEvent } from 'react';
import { plainKeyName, type KeyNumber } from '@/lib/harmony/note';
import { BLACK_HEIGHT, BLACK_WIDTH, countWhite, FOOT_HEIGHT, keyShapes, WHITE_HEIGHT, WHITE_WIDTH, type DrawnKeyShape } from './keyboard-shape';

/** What is written on a key: the degree, what it does in the chord, and how it is said. */
export type KeyMark = { text: string; role: 'frame' | 'colour' | 'tension'; spoken: string };

type KeyboardProps = {
  lowest: KeyNumber; highest: KeyNumber; label: string;
  held: ReadonlySet<KeyNumber>;
  /** Keys of the asked voicing, shown when the answer may be seen. */
  marks?: ReadonlyMap<KeyNumber, KeyMark>;
  onDown?: (key: KeyNumber) => void;
  onUp?: (key: KeyNumber) => void;
};

const MARK_FILL = { frame: '#1c2130', colour: '#8f4f0e', tension: '#1d5a73' } as const;

/** A keyboard to press with finger, mouse, or Tab, arrows and Space. Held keys are brass and say so. */
export function Keyboard({ lowest, highest, label, held, marks, onDown, onUp }: KeyboardProps) {
  const [focused, setFocused] = useState(() => Math.min(highest, Math.max(lowest, 60)));
  const active = focused >= lowest && focused <= highest ? focused : lowest;
  const width = countWhite(lowest, highest) * WHITE_WIDTH;
  const shapes = keyShapes(lowest, highest);
  const steer = (event: KeyboardEvent<SVGElement>) => {
    const step = { ArrowRight: 1, ArrowLeft: -1, ArrowUp: 12, ArrowDown: -12 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const next = Math.min(highest, Math.max(lowest, active + step));
    setFocused(next);
    event.currentTarget.querySelector<SVGElement>(`[data-key="${next}"]`)?.focus();
  };
  return (
    <div className="overflow-x-auto pb-1" tabIndex={-1}>
      <svg viewBox={`0 0 ${width} ${WHITE_HEIGHT + FOOT_HEIGHT}`} role="group" aria-label={label} onKeyDown={steer} className="block w-full select-none max-md:min-w-[calc(var(--whites)*26px)]" style={{ ['--whites' as string]: countWhite(lowest, highest) }}>
        {shapes.map((shape) => (
          <PianoKey key={shape.key} shape={shape} isHeld={held.has(shape.key)} mark={marks?.get(shape.key)} isTabStop={shape.key === active} canPlay={onDown !== undefined}
            onFocus={() => setFocused(shape.key)} onDown={() => onDown?.(shape.key)} onUp={() => onUp?.(shape.key)} />
        ))}
        {shapes.filter(({ key }) => key % 12 === 0).map(({ key, x }) => (
          <text key={key} x={x + 4} y={WHITE_HEIGHT + 15} fontSize={11} fill="#686c7d" aria-hidden>{plainKeyName(key)}</text>
        ))}
      </svg>
    </div>
  );
}

type PianoKeyProps = { shape: DrawnKeyShape; isHeld: boolean; mark: KeyMark | undefined; isTabStop: boolean; canPlay: boolean; onFocus: () => void; onDown: () => void; onUp: () => void };

function PianoKey({ shape: { key, isBlack, x }, isHeld, mark, isTabStop, canPlay, onFocus, onDown, onUp }: PianoKeyProps) {
  const [width, height] = isBlack ? [BLACK_WIDTH, BLACK_HEIGHT] : [WHITE_WIDTH, WHITE_HEIGHT];
  const press = (event: KeyboardEvent) => {
    if (!isPress(event)) return;
    event.preventDefault();
    if (!event.repeat) onDown();
  };
  return (
    <g>
      <rect x={x} y={0} width={width} height={height} rx={2} strokeWidth={isHeld ? 2 : 1} fill={fillOf(isBlack, isHeld, mark)} stroke={strokeOf(isBlack, isHeld)}
        role="button" aria-label={nameOf(key, isHeld, mark)} aria-pressed={isHeld} aria-disabled={!canPlay} data-key={key} tabIndex={isTabStop ? 0 : -1} className={canPlay ? 'cursor-pointer' : ''} style={{ touchAction: 'manipulation' }}
        onFocus={onFocus} onKeyDown={press} onKeyUp={(event) => { if (isPress(event)) onUp(); }}
        onPointerDown={(event) => { letGo(event); onDown(); }} onPointerUp={onUp} onPointerLeave={(event) => { if (event.buttons > 0) onUp(); }} onPointerCancel={onUp} />
      {mark || isHeld ? <Mark x={x + width / 2} y={isBlack ? 62 : 106} mark={mark} isBlack={isBlack} /> : null}
    </g>
  );
}

/** A finger may slide off a key, so a touch is not tied to the key it began on. */
function letGo({ currentTarget, pointerId }: PointerEvent<SVGElement>): void {
  if (currentTarget.hasPointerCapture(pointerId)) currentTarget.releasePointerCapture(pointerId);
}

const isPress = (event: KeyboardEvent): boolean => event.key === ' ' || event.key === 'Enter';
const nameOf = (key: KeyNumber, isHeld: boolean, mark: KeyMark | undefined): string =>
  [plainKeyName(key), mark?.spoken, isHeld ? 'held' : null].filter(Boolean).join(', ');

function strokeOf(isBlack: boolean, isHeld: boolean): string {
  if (isHeld) return '#8f4f0e';
  return isBlack ? '#1c2130' : '#bfb49b';
}

function fillOf(isBlack: boolean, isHeld: boolean, mark: KeyMark | undefined): string {
  if (isHeld) return isBlack ? '#b8691a' : '#f0cf9f';
  if (isBlack) return mark ? '#4b5063' : '#1c2130';
  return mark ? '#f8ead6' : '#ffffff';
}

function Mark({ x, y, mark, isBlack }: { x: number; y: number; mark: KeyMark | undefined; isBlack: boolean }) {
  if (!mark) return <circle cx={x} cy={y} r={5} fill={isBlack ? '#ffffff' : '#8f4f0e'} pointerEvents="none" aria-hidden />;
  return (
    <g pointerEvents="none" aria-hidden>
      <circle cx={x} cy={y} r={isBlack ? 10 : 12} fill={MARK_FILL[mark.role]} stroke={isBlack ? '#ffffff' : 'none'} />
      <text x={x} y={y + 4.5} textAnchor="middle" fontSize={mark.text.length > 2 ? 10.5 : 12.5} fontWeight={700} fill="#ffffff">{mark.text}</text>
    </g>
  );
}
