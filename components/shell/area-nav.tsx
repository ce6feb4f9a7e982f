'use client';
/** The area names in the bar. Client: it marks the one that the address lies in. */
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { AREAS, isWithin } from './area';

export function AreaNav() {
  const pathname = usePathname();
  return (
    <nav aria-label="Areas" className="max-md:order-last max-md:w-full max-md:border-t max-md:border-rule">
      <ul className="flex h-full max-md:justify-between">
        {AREAS.map((area) => {
          const here = area.pages.some((page) => isWithin(pathname, page));
          return (
            <li key={area.href} className="flex">
              <Link
                href={area.href}
                aria-current={here ? (pathname === area.href ? 'page' : 'true') : undefined}
                className={`group flex items-center px-3.5 max-md:min-h-11 max-md:px-2.5 lg:px-4 ${here ? 'font-semibold text-ink' : 'text-soft hover:text-ink'}`}
              >
                <span
                  className={`border-y-[3px] border-t-transparent py-0.5 leading-snug ${here ? 'border-b-copper' : 'border-b-transparent group-hover:border-b-rule'}`}
                >
                  {area.word}
                </span>
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
