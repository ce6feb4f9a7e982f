'use client';
/** Who is signed in, and what they can do about it. A disclosure rather than a menu: its content is links and forms. */
import Link from 'next/link';
import { useEffect, useId, useRef, useState } from 'react';
import { Glyph } from '@/components/ui/glyph';
import { ThemeSwitch } from '@/components/ui/theme-switch';

export interface ShellPerson {
  readonly name: string;
  readonly roles: readonly string[];
}

export interface ShellWorkshop {
  readonly id: string;
  readonly name: string;
}

/** A server action; called with `workshopId` where it switches the workshop. */
export type ShellAction = (form: FormData) => void | Promise<void>;

export function PersonMenu({
  person,
  workshop,
  workshops,
  switchWorkshop,
  signOut,
}: {
  readonly person: ShellPerson;
  readonly workshop: ShellWorkshop;
  readonly workshops: readonly ShellWorkshop[];
  readonly switchWorkshop?: ShellAction;
  readonly signOut: ShellAction | string;
}) {
  const [open, setOpen] = useState(false);
  const panelId = useId();
  const frame = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);

  useEffect(() => {
    if (!open) return undefined;
    function onPointer(event: PointerEvent) {
      if (event.target instanceof Node && !frame.current?.contains(event.target)) setOpen(false);
    }
    document.addEventListener('pointerdown', onPointer);
    return () => document.removeEventListener('pointerdown', onPointer);
  }, [open]);

  const first = person.roles[0];
  const others = workshops.filter((other) => other.id !== workshop.id);
  const entry = 'flex min-h-10 w-full items-center gap-2.5 px-3 text-left hover:bg-copper-wash max-sm:min-h-12';
  return (
    <div
      ref={frame}
      className="relative flex max-md:items-center"
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || !open) return;
        setOpen(false);
        button.current?.focus();
      }}
      onBlur={(event) => {
        if (event.relatedTarget instanceof Node && !event.currentTarget.contains(event.relatedTarget)) setOpen(false);
      }}
    >
      <button
        ref={button}
        type="button"
        aria-expanded={open}
        aria-controls={panelId}
        onClick={() => setOpen((before) => !before)}
        className="flex items-center gap-3 px-4 hover:bg-copper-wash max-md:size-11 max-md:justify-center max-md:px-0"
      >
        <span className="flex items-baseline gap-3 max-md:sr-only">
          {first === undefined ? null : (
            <span className="text-soft max-lg:sr-only">
              {capital(first)}
              {person.roles.length > 1 ? ` +${person.roles.length - 1}` : ''}
            </span>
          )}
          <span className="font-mono text-small">{person.name}</span>
        </span>
        <Glyph name="down" size={12} className="text-soft max-md:hidden" />
        <Glyph name="menu" size={20} className="md:hidden" />
      </button>
      <div
        id={panelId}
        hidden={!open}
        className="absolute top-full right-0 z-40 mt-px w-64 border border-ink bg-sheet max-md:-right-3 max-md:w-[min(20rem,100vw)]"
      >
        <p className="border-b border-rule px-3 py-2.5">
          <span className="font-semibold">{person.name}</span>
          <span className="block text-small text-soft">
            {person.roles.length === 0 ? 'no role yet' : person.roles.join(', ')} at {workshop.name}
          </span>
        </p>
        {others.length > 0 && switchWorkshop !== undefined ? (
          <form action={switchWorkshop} className="border-b border-rule py-1">
            {others.map((other) => (
              <button key={other.id} type="submit" name="workshopId" value={other.id} className={entry}>
                <Glyph name="mark" className="text-soft" />
                <span>
                  Go to <span className="font-semibold">{other.name}</span>
                </span>
              </button>
            ))}
          </form>
        ) : null}
        <ThemeSwitch />
        <div className="border-t border-rule">
          {typeof signOut === 'string' ? (
            <Link href={signOut} className={entry}>
              <Glyph name="close" className="text-soft" />
              Sign out
            </Link>
          ) : (
            <form action={signOut}>
              <button type="submit" className={entry}>
                <Glyph name="close" className="text-soft" />
                Sign out
              </button>
            </form>
          )}
        </div>
      </div>
    </div>
  );
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}
