import Link from 'next/link';
import type { ComponentProps, ReactNode } from 'react';

export type ButtonKind = 'plain' | 'primary' | 'brass' | 'quiet' | 'danger';

const BASE = 'inline-flex items-center justify-center gap-2 rounded border px-4 py-[10px] text-[14px] font-semibold leading-none no-underline transition-colors duration-100 tap disabled:opacity-55 aria-disabled:opacity-55 whitespace-nowrap';
const KINDS: Record<ButtonKind, string> = {
  plain: 'border-rule-strong bg-sheet text-ink hover:bg-wash',
  primary: 'border-ink bg-ink text-white hover:bg-ink-2',
  brass: 'border-brass bg-brass text-white hover:bg-[#7a430b]',
  quiet: 'border-transparent bg-transparent px-2 text-petrol hover:underline',
  danger: 'border-brick bg-sheet text-brick hover:bg-brick-wash',
};

export const buttonClass = (kind: ButtonKind = 'plain', extra = ''): string => `${BASE} ${KINDS[kind]} ${extra}`;

type ButtonProps = ComponentProps<'button'> & { kind?: ButtonKind; pending?: boolean; icon?: ReactNode };

/** While it works it says so to a screen reader and cannot be pressed twice. */
export function Button({ kind = 'plain', pending = false, icon, className = '', children, type = 'button', disabled, ...rest }: ButtonProps) {
  return (
    <button {...rest} type={type} disabled={disabled === true || pending} aria-busy={pending || undefined} className={buttonClass(kind, className)}>
      {pending ? <Spinner /> : icon}
      {children}
    </button>
  );
}

type ButtonLinkProps = ComponentProps<typeof Link> & { kind?: ButtonKind; icon?: ReactNode };

export function ButtonLink({ kind = 'plain', icon, className = '', children, ...rest }: ButtonLinkProps) {
  return <Link {...rest} className={buttonClass(kind, className)}>{icon}{children}</Link>;
}

function Spinner() {
  return <span aria-hidden className="inline-block size-[14px] animate-spin rounded-full border-2 border-current border-r-transparent" />;
}
