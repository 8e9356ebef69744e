import 'server-only';
import type { Db } from '@/db/connection';
import { findSheets, type ImportBatch } from '@/db/imports';
import { whatSchoolKnows } from '@/db/imports-known';
import { allSites, type Site } from '@/db/rooms';
import { closuresBetween, currentOrNextTerm, findTerm } from '@/db/terms';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { instantOf, type LocalDate, type Span } from '@/lib/time';
import type { Sheet } from '../cell';
import type { CheckOptions } from '../check-workbook';
import { importSettingsSchema, type ImportChoices, type ImportSettings } from '../schema';
import type { LessonPlan } from '../weekly-slots';

export const settingsOf = ({ mappingJson }: Pick<ImportBatch, 'mappingJson'>): ImportSettings => importSettingsSchema.parse(JSON.parse(mappingJson));

export async function sheetsOf(db: Db, batchId: string): Promise<Sheet[]> {
  const json = await findSheets(db, batchId);
  if (json === null) throw new AppError('conflict', 'The cells of this workbook are no longer kept. Choose the workbook again.');
  return JSON.parse(json) as Sheet[];
}

/** What the form starts from: the first site, the term under way or the next, lessons from today on. */
export async function firstChoices({ db, today }: Pick<Context, 'db' | 'today'>): Promise<ImportChoices> {
  const [sites, term] = [await allSites(db), await currentOrNextTerm(db, today)];
  if (!sites[0]) throw new AppError('conflict', 'The school has no site yet. Add one in the settings first.');
  return { siteId: sites[0].id, engagementKind: null, termId: term?.id ?? null, newTerm: null, lessonsFrom: term ? later(today, term.startsOn) : null };
}

const later = (a: LocalDate, b: LocalDate): LocalDate => (a > b ? a : b);

export type SiteOptions = CheckOptions & { site: Site };

/** Everything that the check asks beside the cells: what the school knows, and where lessons would lie. */
export async function checkOptionsFor(db: Db, choices: ImportChoices, { today, school }: Pick<Context, 'today' | 'school'>): Promise<SiteOptions> {
  const site = (await allSites(db)).find(({ id }) => id === choices.siteId);
  if (!site) throw new AppError('invalid', 'Choose the site of this workbook.', { siteId: ['Choose a site.'] });
  const plan = await lessonPlanFor(db, choices, site, today);
  const span: Span | null = plan && { startsAt: instantOf(plan.from, 0, site.zone), endsAt: instantOf(plan.term.endsOn, 1439, site.zone) + 60 };
  return { site, currency: school.currency, today, siteId: site.id, plan, known: await whatSchoolKnows(db, { siteId: site.id, today, span }) };
}

async function lessonPlanFor(db: Db, { termId, newTerm, lessonsFrom }: ImportChoices, site: Site, today: LocalDate): Promise<LessonPlan | null> {
  const term = newTerm ?? (termId === null ? null : ((await findTerm(db, termId)) ?? null));
  if (!term) return null;
  const from = lessonsFrom ?? later(today, term.startsOn);
  return { term: { startsOn: term.startsOn, endsOn: term.endsOn }, from, siteId: site.id, zone: site.zone, closures: await closuresBetween(db, term.startsOn, term.endsOn) };
}
