import type { Db, Trx } from './connection';

export type Site = { id: string; name: string; zone: string; legalEntityId: string; colour: string; addressLines: string };
export type Room = {
  id: string; siteId: string; siteName: string; zone: string; name: string; description: string; personLimit: number; turnoverMin: number; features: string[];
};
type RoomRow = Omit<Room, 'features'> & { features: string | null };

export const allSites = (db: Db): Promise<Site[]> => db<Site & { orderNo: number }>('site').orderBy(['orderNo', 'name'])
  .select('id', 'name', 'zone', 'legalEntityId', 'colour', 'addressLines');

/** Live rooms with the codes of what stands in them, in the order of the room board. */
export async function liveRooms(db: Db): Promise<Room[]> {
  const rows = (await db('room as r').join('site as s', 's.id', 'r.siteId').where('r.state', 'live')
    .select('r.id', 'r.siteId', 's.name as siteName', 's.zone', 'r.name', 'r.description', 'r.personLimit', 'r.turnoverMin',
      db.raw('(SELECT group_concat(f.code) FROM room_feature rf JOIN feature f ON f.id = rf.feature_id WHERE rf.room_id = r.id) AS features'))
    .orderBy(['s.orderNo', 's.name', 'r.orderNo', 'r.name'])) as RoomRow[];
  return rows.map(({ features, ...room }) => ({ ...room, features: features?.split(',') ?? [] }));
}

export async function findRoom(db: Db, id: string): Promise<Room | undefined> {
  return (await liveRooms(db)).find((room) => room.id === id);
}

export type Feature = { id: string; code: string; label: string };
export const allFeatures = (db: Db): Promise<Feature[]> => db<Feature>('feature').orderBy('label').select('id', 'code', 'label');

export type OpeningSpan = { siteId: string; weekday: number; fromMin: number; toMin: number };
export const openingSpans = (db: Db): Promise<OpeningSpan[]> =>
  db<OpeningSpan & { validTo: string | null }>('opening_span').whereNull('validTo').select('siteId', 'weekday', 'fromMin', 'toMin').orderBy(['siteId', 'weekday']);

export type TravelTime = { fromSiteId: string; toSiteId: string; minutes: number };
export const travelTimes = (db: Db): Promise<TravelTime[]> => db<TravelTime>('travel_time').select('fromSiteId', 'toSiteId', 'minutes');

export async function insertLegalEntity(trx: Trx, entity: { id: string; name: string; country: string; currency: string; addressLines?: string; numberPrefix?: string; taxNumber?: string }): Promise<void> {
  await trx('legal_entity').insert(entity);
}
export async function insertSite(trx: Trx, site: { id: string; legalEntityId: string; name: string; zone: string; colour?: string; orderNo?: number; addressLines?: string }): Promise<void> {
  await trx('site').insert(site);
}
export async function insertOpeningSpans(trx: Trx, spans: (OpeningSpan & { id: string })[]): Promise<void> {
  if (spans.length > 0) await trx('opening_span').insert(spans);
}
export async function insertTravelTime(trx: Trx, time: TravelTime & { milesTenths?: number }): Promise<void> {
  await trx('travel_time').insert(time);
}

type NewRoom = { id: string; siteId: string; name: string; description?: string; personLimit: number; turnoverMin?: number; orderNo?: number; isStepFree?: boolean; externalKey?: string; featureIds?: string[] };
export async function insertRoom(trx: Trx, { isStepFree = false, featureIds = [], ...room }: NewRoom): Promise<void> {
  await trx('room').insert({ ...room, isStepFree: isStepFree ? 1 : 0 });
  if (featureIds.length > 0) await trx('room_feature').insert(featureIds.map((featureId) => ({ roomId: room.id, featureId })));
}

/** The feature with this code, made when it is new. */
export async function ensureFeature(trx: Trx, feature: Feature): Promise<string> {
  await trx('feature').insert(feature).onConflict('code').ignore();
  const row = await trx<Feature>('feature').where({ code: feature.code }).first('id');
  return row?.id ?? feature.id;
}
