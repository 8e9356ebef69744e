import 'server-only';
import { setFeatureQuantity } from '@/db/imports-write';
import { allFeatures, ensureFeature, insertRoom } from '@/db/rooms';
import type { RoomFacts } from '../rows';
import { makeId, type ImportRun, type Place } from './import-run';

/** A room of the chosen site with what stands in it, in the order of the sheet. */
export async function writeRoom(run: ImportRun, facts: RoomFacts, place: Place): Promise<string> {
  const { trx, site } = run;
  const id = makeId(run, 'room', place);
  await insertRoom(trx, { id, siteId: site.id, name: facts.name, description: facts.description, personLimit: facts.personLimit, orderNo: place.rowNo, isStepFree: facts.features.some(({ code }) => code === 'step_free'), externalKey: place.key });
  const known = new Map((await allFeatures(trx)).map((feature) => [feature.code, feature.id]));
  for (const { code, label, quantity } of facts.features) {
    const featureId = known.get(code) ?? (await ensureFeature(trx, { id: makeId(run, 'feature', place), code, label }));
    await setFeatureQuantity(trx, id, featureId, quantity);
  }
  return id;
}
