import Link from 'next/link';
import { linkPurpose } from '@/lib/people/server/sign-in-links';
import { publicMoment } from '@/lib/server/request-facts';
import { ChoosePasswordForm } from '../_components/choose-password-form';

export const metadata = { title: 'Choose a password' };

export default async function ChoosePasswordPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const purpose = await linkPurpose(token, await publicMoment());
  return (
    <div className="mx-auto max-w-[420px] py-10">
      <h1 className="text-h1">{purpose ? 'Choose a password' : 'This link no longer works'}</h1>
      {purpose ? (
        <>
          <p className="mb-6 mt-1 text-ink-3">At least 15 characters. Three or four words with spaces are easy to remember and hard to guess.</p>
          <ChoosePasswordForm token={token} />
        </>
      ) : (
        <p className="mt-3">It has been used or has run out. <Link href="/forgot-password" className="underline text-petrol">Ask for a new one</Link>.</p>
      )}
    </div>
  );
}
