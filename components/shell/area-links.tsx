'use client';
/** Quiet links between the pages of one area, in the page itself. Client: it marks the page that is open. */
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { isWithin } from './area';

export interface AreaLink {
  readonly word: string;
  readonly href: string;
  /** How many things wait there; not shown when 0. */
  readonly count?: number;
  /** Marks the link only on its very page, for an area's first page that the others lie below. */
  readonly exact?: boolean;
}

export function AreaLinks({ label, links }: { readonly label: string; readonly links: readonly AreaLink[] }) {
  const pathname = usePathname();
  return (
    <nav aria-label={label} className="-mt-2 mb-1.5 print:hidden">
      <ul className="-ml-2 flex flex-wrap gap-x-1">
        {links.map((link) => {
          const here = link.exact ? pathname === link.href : isWithin(pathname, link.href);
          return (
            <li key={link.href}>
              <Link
                href={link.href}
                aria-current={here ? (pathname === link.href ? 'page' : 'true') : undefined}
                className={`flex min-h-8 items-center gap-1.5 px-2 text-small max-sm:min-h-11 ${here ? 'font-semibold text-ink' : 'text-copper hover:bg-copper-wash'}`}
              >
                {link.word}
                {link.count !== undefined && link.count > 0 ? (
                  <span className="font-mono">{link.count.toLocaleString('en-GB')}</span>
                ) : null}
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
