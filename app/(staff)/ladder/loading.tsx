import { ListSkeleton, Skeleton } from '@/components/ui/states';

export default function Loading() {
  return (
    <div className="pt-6">
      <Skeleton className="h-8 w-40" />
      <ListSkeleton rows={10} label="Loading the ladder" />
    </div>
  );
}
