import { redirect } from 'next/navigation';
import { publicSchool } from '@/lib/people/server/public-school';
import { currentContext } from '@/lib/server/context';
import { publicMoment } from '@/lib/server/request-facts';
import { SignInForm } from './_components/sign-in-form';

export const metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ error?: string; chosen?: string }> }) {
  if (await currentContext()) redirect('/');
  const school = await publicSchool(await publicMoment());
  if (!school) redirect('/set-up');
  const { error, chosen } = await searchParams;
  return (
    <div className="mx-auto max-w-[420px] py-10">
      <h1 className="text-h1">Sign in</h1>
      <p className="mb-6 mt-1 text-ink-3">{school.name}</p>
      {chosen ? <p className="mb-4 rounded bg-felt-wash px-3 py-2 text-felt">Your password is set. Sign in with it.</p> : null}
      <SignInForm hasFailed={error !== undefined} />
    </div>
  );
}
