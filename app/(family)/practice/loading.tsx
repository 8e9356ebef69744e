import { PageSkeleton } from '@/components/ui/states';

export default function Loading() { return <PageSkeleton />; }
