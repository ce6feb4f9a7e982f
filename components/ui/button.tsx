/** What can be acted on. One look for buttons that do and links that go; `ButtonLink` is for the latter. */
import Link from 'next/link';
import type { ButtonHTMLAttributes, ReactNode } from 'react';

export type ButtonKind = 'primary' | 'secondary' | 'quiet' | 'danger';
export type ButtonSize = 'small' | 'normal' | 'large';

const KINDS: Readonly<Record<ButtonKind, string>> = {
  primary: 'border-copper bg-copper text-sheet hover:border-copper-deep hover:bg-copper-deep',
  secondary: 'border-copper bg-transparent text-copper hover:bg-copper-wash',
  quiet: 'border-transparent bg-transparent text-copper hover:bg-copper-wash',
  danger: 'border-oxide bg-transparent text-oxide hover:bg-oxide-wash',
};

const SIZES: Readonly<Record<ButtonSize, string>> = {
  small: 'min-h-8 px-2.5 py-1 text-small',
  normal: 'min-h-9 px-3.5 py-1.5 text-body',
  large: 'min-h-12 px-5 py-2.5 text-lead',
};

export function buttonClass(kind: ButtonKind, size: ButtonSize, wide: boolean): string {
  return `inline-flex items-center justify-center gap-2 border font-semibold text-center leading-tight transition-colors select-none disabled:opacity-55 aria-disabled:opacity-55 ${KINDS[kind]} ${SIZES[size]} ${wide ? 'w-full' : ''}`;
}

interface Look {
  readonly kind?: ButtonKind;
  readonly size?: ButtonSize;
  /** As wide as what holds it: for a phone's main action. */
  readonly wide?: boolean;
}

export type ButtonProps = Look &
  Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'className'> & {
    /** While a request is under way: says so, refuses a second press, keeps the focus (a disabled button would lose it). */
    readonly busy?: boolean;
    readonly busyWord?: string;
  };

export function Button({
  kind = 'secondary',
  size = 'normal',
  wide = false,
  busy = false,
  busyWord,
  type = 'button',
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      // Only given where needed, so that a plain button can be rendered on the server.
      onClick={busy ? (event) => event.preventDefault() : onClick}
      className={buttonClass(kind, size, wide)}
    >
      {busy && busyWord !== undefined ? busyWord : children}
    </button>
  );
}

export function ButtonLink({
  href,
  kind = 'secondary',
  size = 'normal',
  wide = false,
  download,
  children,
}: Look & { readonly href: string; readonly download?: boolean | string; readonly children: ReactNode }) {
  const className = buttonClass(kind, size, wide);
  // A download is no navigation: the router must not try to render it.
  if (download !== undefined && download !== false) {
    return (
      <a href={href} download={download} className={className}>
        {children}
      </a>
    );
  }
  return (
    <Link href={href} className={className}>
      {children}
    </Link>
  );
}
