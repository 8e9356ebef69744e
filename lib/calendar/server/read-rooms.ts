import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { allFeatures, allSites, ensureFeature, insertRoom, liveRooms, type Feature, type Room, type Site } from '@/db/rooms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { roomSchema } from '../schema';

export async function readRooms({ db, ability }: Context): Promise<{ rooms: Room[]; sites: Site[]; features: Feature[] }> {
  assertCan(ability, 'read', 'Room', {});
  return { rooms: await liveRooms(db), sites: await allSites(db), features: await allFeatures(db) };
}

/** Adds a room with what stands in it; its name is unique at its site. */
export async function addRoom(input: z.output<typeof roomSchema>, context: Context): Promise<{ id: string }> {
  const { db } = context;
  assertCan(context.ability, 'create', 'Room', {});
  const site = (await allSites(db)).find(({ id }) => id === input.siteId);
  if (!site) throw notFound('site');
  if ((await liveRooms(db)).some(({ siteId, name }) => siteId === site.id && name.toLowerCase() === input.name.toLowerCase())) {
    throw new AppError('conflict', 'This site has a room of that name.', { name: ['Choose another name.'] });
  }
  const id = newId();
  const features = await allFeatures(db);
  await transaction(db, async (trx) => {
    const featureIds: string[] = [];
    for (const feature of features.filter(({ code }) => input.features.includes(code))) featureIds.push(await ensureFeature(trx, feature));
    await insertRoom(trx, { id, siteId: site.id, name: input.name, description: input.description, personLimit: input.personLimit, turnoverMin: input.turnoverMin, isStepFree: input.features.includes('step_free'), featureIds });
    await recordAudit(trx, context, { action: 'create', tableName: 'room', rowId: id, after: input, sentence: `Added ${input.name} at ${site.name}.` });
  });
  return { id };
}
