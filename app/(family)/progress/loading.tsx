import { Skeleton } from '@/components/ui/states';

export default function Loading() {
  return (
    <div role="status" className="pt-6">
      <span className="sr-only">Loading the ladder</span>
      <Skeleton className="h-8 w-56" />
      <Skeleton className="mt-6 h-[300px] w-full" />
      <Skeleton className="mt-4 h-[220px] w-full" />
    </div>
  );
}
