import { PageHeader } from '@/components/ui/page-header';
import { Find } from '@/components/shell/find';
import { requireContextTo } from '@/lib/server/context';
import { ButtonsAndChips } from './_components/buttons-and-chips';
import { Dialogs } from './_components/dialogs';
import { Fields } from './_components/fields';
import { States } from './_components/states';
import { Tables } from './_components/tables';

export const metadata = { title: 'Components' };

/** For whoever builds screens: every part in every state, on one page that is reached by its address. */
export default async function ComponentsPage() {
  const { school } = await requireContextTo('manage', 'Settings');
  return (
    <>
      <PageHeader title="Components" sub="Every part of the screens in its states. For people who build them." actions={<Find />} />
      <div className="grid items-start gap-[18px] xl:grid-cols-2">
        <div className="flex min-w-0 flex-col gap-[18px]">
          <ButtonsAndChips />
          <Dialogs />
          <States />
        </div>
        <Fields currencySign={currencySignOf(school)} />
        <div className="min-w-0 xl:col-span-2"><Tables /></div>
      </div>
    </>
  );
}

const currencySignOf = ({ locale, currency }: { locale: string; currency: string }): string =>
  new Intl.NumberFormat(locale, { style: 'currency', currency }).formatToParts(0).find(({ type }) => type === 'currency')?.value ?? currency;
