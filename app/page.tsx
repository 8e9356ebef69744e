import { redirect } from 'next/navigation';
import { homeOf } from '@/components/shell/sections';
import { requireContext } from '@/lib/server/context';

/** Each role opens on what needs doing now. */
export default async function FirstPage() {
  const { actor } = await requireContext();
  redirect(homeOf(actor.role));
}
