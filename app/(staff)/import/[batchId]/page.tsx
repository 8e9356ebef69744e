import { Find } from '@/components/shell/find';
import { ButtonLink } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import { importDetail, type ImportDetail } from '@/lib/imports/server/import-screen';
import { requireContextTo } from '@/lib/server/context';
import { orNotFound } from '@/lib/server/or-not-found';
import { ChoicesForm } from './_components/choices-form';
import { ControlSheet } from './_components/control-sheet';
import { RowTables } from './_components/row-tables';
import { UndoSheet } from './_components/undo-sheet';
import { WorkUnderWay } from './_components/work-under-way';

export const metadata = { title: 'Import' };

const SUBS: Record<ImportDetail['state'], string> = {
  uploaded: 'Not read yet. Nothing has been brought in.', checked: 'Checked. Nothing has been brought in yet.', imported: 'Brought in.', undone: 'Undone. Nothing of it is left in the school.',
};

export default async function ImportBatchPage({ params }: { params: Promise<{ batchId: string }> }) {
  const context = await requireContextTo('read', 'Import');
  const detail = await orNotFound(importDetail(await params, context));
  const { state, jobId, control } = detail;
  return (
    <>
      <PageHeader title={detail.fileName} sub={SUBS[state]} actions={<><Find /><ButtonLink href="/import">All imports</ButtonLink></>} />
      {jobId ? <WorkUnderWay jobId={jobId} /> : null}
      {control ? (
        <div className="grid items-start gap-[18px] lg:grid-cols-[minmax(0,1fr)_340px]">
          <RowTables sheets={detail.sheets} readings={detail.readings} />
          <div className="flex flex-col gap-[14px] max-lg:order-first">
            {state === 'checked' ? <ChoicesForm detail={detail} key={JSON.stringify([detail.choices, detail.readings])} /> : null}
            {state === 'imported' ? <UndoSheet batchId={detail.batchId} fileName={detail.fileName} obstacles={detail.obstacles} /> : null}
            <ControlSheet control={control} currency={detail.currency} locale={detail.locale} />
          </div>
        </div>
      ) : null}
    </>
  );
}
