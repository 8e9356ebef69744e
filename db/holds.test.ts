import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { expect, it } from 'vitest';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { freshDb } from '@/tests/support/fresh-db';
import { insertHolds, isHoldOverlap, releaseHolds, takenSpans, type Holder } from './holds';
import { seededRandom } from './seeds/random';
import { transaction } from './transaction';

type Booking = { id: string; startsAt: number; endsAt: number; holders: Holder[] };
const DAY = Date.UTC(2026, 10, 17) / 1000;
const touches = (a: Booking, b: Booking) => a.startsAt < b.endsAt && b.startsAt < a.endsAt && a.holders.some(({ holderKind, holderId }) => b.holders.some((other) => other.holderKind === holderKind && other.holderId === holderId));

async function book(db: Knex, booking: Booking, replaces?: Booking): Promise<boolean> {
  try {
    await transaction(db, async (trx) => {
      if (replaces) await releaseHolds(trx, { maintenanceId: replaces.id });
      await trx('maintenance').insert({ id: booking.id, roomId: 'q1', kind: 'repair', startsAt: booking.startsAt, endsAt: booking.endsAt });
      await insertHolds(trx, booking.holders.map((holder) => ({ ...holder, startsAt: booking.startsAt, endsAt: booking.endsAt })), { maintenanceId: booking.id });
    });
    return true;
  } catch (error) {
    if (isHoldOverlap(error)) return false;
    throw error;
  }
}

/** Invariant 1 of the job map, 1.8. */
it('2,000 random bookings, moves and cancellations: nobody is ever in two places, and nothing is refused without a clash', async () => {
  const db = freshDb();
  await lanternStreet(db);
  const random = seededRandom(20261117);
  const draw = (count: number) => Math.floor(random() * count);
  const wish = (): Booking => {
    const startsAt = DAY + draw(7) * 86_400 + draw(60) * 900;
    return {
      id: randomUUID(), startsAt, endsAt: startsAt + (1 + draw(random() < 0.02 ? 96 : 8)) * 900,
      holders: [{ holderKind: 'teacher', holderId: `teacher-${draw(6)}` }, { holderKind: 'room', holderId: `room-${draw(6)}` }, { holderKind: 'student', holderId: `student-${draw(25)}` }],
    };
  };
  const live = new Map<string, Booking>();
  const count = { booked: 0, moved: 0, cancelled: 0, refused: 0 };
  for (let step = 0; step < 2000; step += 1) {
    const [dice, known] = [random(), [...live.values()]];
    const chosen = known[draw(known.length)];
    if (chosen && dice < 0.2) {
      await transaction(db, (trx) => releaseHolds(trx, { maintenanceId: chosen.id }));
      live.delete(chosen.id);
      count.cancelled += 1;
      continue;
    }
    const replaces = chosen && dice < 0.5 ? chosen : undefined;
    const booking = wish();
    const clash = known.some((other) => other !== replaces && touches(booking, other));
    expect(await book(db, booking, replaces)).toBe(!clash);
    if (clash) { count.refused += 1; continue; }
    if (replaces) live.delete(replaces.id);
    live.set(booking.id, booking);
    count[replaces ? 'moved' : 'booked'] += 1;
  }
  for (const number of Object.values(count)) expect(number).toBeGreaterThan(50);
  const rows: { holderKind: string; holderId: string; startsAt: number; endsAt: number }[] = await db('hold').where({ isLive: 1 });
  expect(rows).toHaveLength(live.size * 3);
  for (const [index, row] of rows.entries()) {
    for (const other of rows.slice(index + 1)) {
      const same = row.holderKind === other.holderKind && row.holderId === other.holderId;
      expect(same && row.startsAt < other.endsAt && other.startsAt < row.endsAt).toBe(false);
    }
  }
}, 60_000);

async function oneHold(): Promise<Knex> {
  const db = freshDb();
  await lanternStreet(db);
  await book(db, { id: 'first', startsAt: DAY, endsAt: DAY + 1800, holders: [{ holderKind: 'room', holderId: 'q1' }] });
  return db;
}
const room = (id: string, startsAt: number, endsAt: number): Booking => ({ id, startsAt, endsAt, holders: [{ holderKind: 'room', holderId: 'q1' }] });

it('spans are half-open: what touches may stand, one second more may not', async () => {
  const db = await oneHold();
  expect(await book(db, room('after', DAY + 1800, DAY + 3600))).toBe(true);
  expect(await book(db, room('before', DAY - 1800, DAY))).toBe(true);
  expect(await book(db, room('too-soon', DAY + 1799, DAY + 1800))).toBe(false);
});
it('a hold of a whole day is found from its last second', async () => {
  const db = await oneHold();
  expect(await book(db, room('day', DAY + 86_400, DAY + 2 * 86_400))).toBe(true);
  expect(await book(db, room('within', DAY + 2 * 86_400 - 1, DAY + 2 * 86_400 + 900))).toBe(false);
  await expect(book(db, room('longer', DAY + 3 * 86_400, DAY + 4 * 86_400 + 1))).rejects.toThrow('CHECK');
  await expect(book(db, room('empty', DAY + 5 * 86_400, DAY + 5 * 86_400))).rejects.toThrow('CHECK');
});
it('a hold set aside takes nobody’s time and cannot come back over another', async () => {
  const db = await oneHold();
  await db('hold').update({ isLive: 0 });
  expect(await book(db, room('second', DAY, DAY + 1800))).toBe(true);
  await expect(db('hold').where({ maintenanceId: 'first' }).update({ isLive: 1 })).rejects.toThrow('hold_overlap');
});
it('what is taken is told for the span that was asked', async () => {
  const db = await oneHold();
  expect(await takenSpans(db, 'room', ['q1', 'q2'], { startsAt: DAY + 1799, endsAt: DAY + 9000 })).toEqual([{ holderKind: 'room', holderId: 'q1', startsAt: DAY, endsAt: DAY + 1800 }]);
  expect(await takenSpans(db, 'room', ['q1'], { startsAt: DAY + 1800, endsAt: DAY + 9000 })).toEqual([]);
  expect(await takenSpans(db, 'teacher', ['q1'], { startsAt: DAY, endsAt: DAY + 9000 })).toEqual([]);
});
