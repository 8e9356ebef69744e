import { redirect } from 'next/navigation';
import { publicSchool } from '@/lib/people/server/public-school';
import { publicMoment } from '@/lib/server/request-facts';
import { COUNTRIES } from './_components/countries';
import { SetUpForm } from './_components/set-up-form';

export const metadata = { title: 'Set the school up' };

export default async function SetUpPage() {
  if (await publicSchool(await publicMoment())) redirect('/sign-in');
  return (
    <div className="py-8">
      <h1 className="text-h1">Set the school up</h1>
      <p className="mb-6 mt-1 text-ink-3">Once. The time zone and the currency stay as you choose them here; everything else can be changed later.</p>
      <SetUpForm zones={Intl.supportedValuesOf('timeZone')} currencies={Intl.supportedValuesOf('currency')} countries={COUNTRIES} />
    </div>
  );
}
