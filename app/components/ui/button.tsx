import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { AppLink } from './app-link.tsx';

/** `filled` once a region, `outlined` second, `quiet` an underlined word, `waiting` an action that still lacks something. */
export type ButtonLook = 'filled' | 'outlined' | 'quiet' | 'waiting';

const shape = 'inline-flex items-center justify-center text-center no-underline cursor-pointer';
const looks: Record<ButtonLook, string> = {
  filled: `${shape} border-2 border-ember bg-ember px-4 font-semibold text-on-ember`,
  outlined: `${shape} border-2 border-ember bg-transparent px-4 font-semibold text-ember`,
  waiting: `${shape} border-2 border-edge bg-transparent px-4 font-semibold text-second`,
  quiet: 'inline cursor-pointer text-ink underline decoration-ember decoration-2 underline-offset-4',
};
const heights = { normal: 'min-h-[max(var(--target-height),40px)] py-1.5', large: 'min-h-14 py-2.5 text-[1.125rem]/6' } as const;

interface LookProps {
  readonly look?: ButtonLook;
  readonly size?: 'normal' | 'large';
  /** As wide as its column. */
  readonly block?: boolean;
  readonly children: ReactNode;
}
export interface ButtonProps extends LookProps, Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'children'> {}
export interface ButtonLinkProps extends LookProps {
  readonly href: string;
  readonly reload?: boolean;
  readonly download?: boolean | string;
  readonly className?: string;
}

function classes({ look = 'filled', size = 'normal', block = false }: Partial<LookProps>, extra = ''): string {
  return [looks[look], look === 'quiet' ? '' : heights[size], block ? 'w-full' : '', extra].filter(Boolean).join(' ');
}

/** A native button; `type` is `submit` unless said otherwise. */
export function Button({ look = 'filled', size = 'normal', block = false, className = '', type = 'submit', children, ...rest }: ButtonProps) {
  return (
    <button type={type} className={classes({ look, size, block }, className)} {...rest}>
      {children}
    </button>
  );
}

/** A link that looks like a button. */
export function ButtonLink({ look = 'filled', size = 'normal', block = false, href, reload = false, download, className = '', children }: ButtonLinkProps) {
  return (
    <AppLink href={href} reload={reload} className={classes({ look, size, block }, className)} {...(download === undefined ? {} : { download })}>
      {children}
    </AppLink>
  );
}
