import { PageHeader } from '@/components/ui/page-header';
import { Tabs } from '@/components/ui/tabs';
import { readConsequences } from '@/lib/calendar/server/change-consequence';
import { readTerms } from '@/lib/calendar/server/read-terms';
import { readRates } from '@/lib/payroll/server/pay-rates';
import { readAccess } from '@/lib/people/server/access';
import { readHouseRules } from '@/lib/people/server/house-rules';
import { readStaffPapers } from '@/lib/people/server/staff-papers';
import { requireContextTo } from '@/lib/server/context';
import { readPriceList } from '@/lib/tuition/server/price-list';
import { AbsencesTab } from './_components/absences-tab';
import { AccessTab } from './_components/access-tab';
import { PricesTab } from './_components/prices-tab';
import { RatesPart } from './_components/rates-part';
import { RulesTab } from './_components/rules-tab';
import { TaxTab } from './_components/tax-tab';
import { TeachersTab } from './_components/teachers-tab';
import { TermsTab } from './_components/terms-tab';

export const metadata = { title: 'Settings' };

/** A tab can be addressed: /settings?tab=teachers. */
export default async function SettingsPage({ searchParams }: { searchParams: Promise<{ tab?: string }> }) {
  const context = await requireContextTo('update', 'Settings');
  const { school, today } = context;
  const [list, access, rules] = [await readPriceList(context), await readAccess(context), await readHouseRules(context)];
  return (
    <>
      <PageHeader title="Settings" sub="Every price, rule and tax treatment has a first day. What was billed or marked before keeps the rule of its day." />
      <Tabs label="Settings" initial={(await searchParams).tab} tabs={[
        { key: 'prices', label: 'Prices', content: <PricesTab list={list} school={school} today={today} /> },
        { key: 'tax', label: 'Tax', content: <TaxTab list={list} locale={school.locale} today={today} /> },
        { key: 'terms', label: 'Terms', content: <TermsTab plan={await readTerms(context)} locale={school.locale} today={today} /> },
        { key: 'absences', label: 'Absences', content: <AbsencesTab versions={await readConsequences(context)} locale={school.locale} today={today} /> },
        { key: 'rules', label: 'House rules', content: <RulesTab rules={rules.rules} history={rules.history} locale={school.locale} today={today} /> },
        { key: 'teachers', label: 'Teachers', content: <><TeachersTab papers={await readStaffPapers(context)} locale={school.locale} today={today} /><RatesPart book={await readRates(context)} locale={school.locale} today={today} /></> },
        { key: 'access', label: 'Access', content: <AccessTab accounts={access.accounts} without={access.without} locale={school.locale} zone={school.zone} /> },
      ]} />
    </>
  );
}
