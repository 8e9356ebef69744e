import { Skeleton } from '@/components/ui/states';

export default function Loading() {
  return (
    <div role="status" className="pt-6">
      <span className="sr-only">Loading the hearing</span>
      <Skeleton className="h-8 w-64" />
      <div className="mt-6 grid gap-4 xl:grid-cols-[250px_minmax(0,1fr)_250px]">
        <Skeleton className="hidden h-[440px] xl:block" />
        <Skeleton className="h-[520px]" />
        <Skeleton className="h-[320px]" />
      </div>
    </div>
  );
}
