/** What the whole form could not do, above its buttons. */
export function FormError({ message }: { message: string | undefined }) {
  if (!message) return null;
  return <p role="alert" className="rounded border border-brick bg-brick-wash px-3 py-2 text-brick">{message}</p>;
}
