import { ForgotForm } from './_components/forgot-form';

export const metadata = { title: 'New password' };

export default function ForgotPasswordPage() {
  return (
    <div className="mx-auto max-w-[420px] py-10">
      <h1 className="text-h1">A new password</h1>
      <p className="mb-6 mt-1 text-ink-3">We send a link to the address you sign in with.</p>
      <ForgotForm />
    </div>
  );
}
