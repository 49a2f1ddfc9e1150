import type { AnchorHTMLAttributes, ReactNode } from 'react';
import { Link, useInRouterContext } from 'react-router';

export interface AppLinkProps extends Omit<AnchorHTMLAttributes<HTMLAnchorElement>, 'href'> {
  readonly href: string;
  /** Ask the server for a whole page: needed offline and for files. */
  readonly reload?: boolean;
  readonly children: ReactNode;
}

/** A link that moves inside the app where a router is present, and is a plain anchor in print and in files. */
export function AppLink({ href, reload = false, children, ...rest }: AppLinkProps) {
  const routed = useInRouterContext();
  if (!routed || !href.startsWith('/') || rest.download !== undefined) {
    return <a href={href} {...rest}>{children}</a>;
  }
  return <Link to={href} reloadDocument={reload} {...rest}>{children}</Link>;
}
