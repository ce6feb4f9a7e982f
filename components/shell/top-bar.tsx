/** The bar across the top: whose workshop, the areas, the one field in the middle, who is here. */
import Link from 'next/link';
import { Glyph } from '@/components/ui/glyph';
import { AreaNav } from './area-nav';
import { FindField } from './find-field';
import { PersonMenu, type ShellAction, type ShellPerson, type ShellWorkshop } from './person-menu';

export interface TopBarProps {
  readonly workshop: ShellWorkshop;
  readonly person: ShellPerson;
  /** All that the person belongs to, for the switch in the menu. */
  readonly workshops?: readonly ShellWorkshop[];
  readonly switchWorkshop?: ShellAction;
  /** A server action, or the address of a page that signs out. */
  readonly signOut?: ShellAction | string;
  readonly homeHref?: string;
}

export function TopBar({
  workshop,
  person,
  workshops = [],
  switchWorkshop,
  signOut = '/sign-out',
  homeHref = '/',
}: TopBarProps) {
  return (
    <header className="border-b border-ink bg-paper print:hidden">
      <div className="flex min-h-[51px] flex-wrap items-stretch max-md:px-3">
        <Link
          href={homeHref}
          className="flex min-w-0 items-center gap-2.5 px-4.5 font-semibold max-md:-ml-2 max-md:px-2 md:border-r md:border-rule"
          aria-label={`${workshop.name}, today`}
        >
          <Glyph name="mark" size={21} className="text-copper" />
          <span className="max-w-56 truncate max-lg:max-w-36 max-md:hidden">{workshop.name}</span>
        </Link>
        <AreaNav />
        <div className="flex min-w-0 flex-1 items-center justify-center px-2 py-1.5 md:px-5">
          <div className="w-full max-w-[520px]">
            <FindField />
          </div>
        </div>
        <div className="flex md:border-l md:border-rule">
          <PersonMenu
            person={person}
            workshop={workshop}
            workshops={workshops}
            signOut={signOut}
            {...(switchWorkshop === undefined ? {} : { switchWorkshop })}
          />
        </div>
      </div>
    </header>
  );
}
