import { Find } from '@/components/shell/find';
import { PageHeader } from '@/components/ui/page-header';
import { importList } from '@/lib/imports/server/import-screen';
import { requireContextTo } from '@/lib/server/context';
import { ImportList } from './_components/import-list';
import { UploadForm } from './_components/upload-form';

export const metadata = { title: 'Import' };

export default async function ImportPage() {
  const context = await requireContextTo('read', 'Import');
  return (
    <>
      <PageHeader title="Import" sub="Bring in the workbook the school was run with. You see every row before anything is written." actions={<Find />} />
      <div className="grid items-start gap-[18px] lg:grid-cols-[minmax(0,1fr)_340px]">
        <ImportList rows={await importList(context)} locale={context.school.locale} zone={context.school.zone} />
        <UploadForm />
      </div>
    </>
  );
}
