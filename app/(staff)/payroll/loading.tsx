import { PageSkeleton } from '@/components/ui/states';

export default PageSkeleton;
