'use client';
/**
 * The one dialog: for a short question in the middle of work. Client: it traps the focus and closes on Escape. Anything
 * a person would share or reload is a page instead.
 */
import { Dialog as Parts } from 'radix-ui';
import type { ReactNode } from 'react';
import { Glyph } from './glyph';

export interface DialogProps {
  readonly title: ReactNode;
  /** One sentence under the title; also what a screen reader reads on opening. */
  readonly description?: ReactNode;
  /** The element that opens it (a `Button`); leave out where `open` is steered from outside. */
  readonly trigger?: ReactNode;
  readonly open?: boolean;
  readonly onOpenChange?: (open: boolean) => void;
  /** `side` stands at the right edge at full height, for an argument beside the rows it is about. */
  readonly place?: 'middle' | 'side';
  readonly wide?: boolean;
  readonly children?: ReactNode;
  /** Buttons; the one that does the work last. Wrap one in `DialogClose` to have it close the dialog. */
  readonly actions?: ReactNode;
}

export function Dialog({
  title,
  description,
  trigger,
  open,
  onOpenChange,
  place = 'middle',
  wide = false,
  children,
  actions,
}: DialogProps) {
  const where =
    place === 'side'
      ? 'inset-y-0 right-0 w-[min(30rem,100vw)] border-l'
      : `top-[8dvh] left-1/2 max-h-[84dvh] -translate-x-1/2 border max-sm:top-auto max-sm:bottom-0 max-sm:max-h-[92dvh] max-sm:w-full ${wide ? 'w-[min(52rem,94vw)]' : 'w-[min(32rem,94vw)]'}`;
  return (
    <Parts.Root {...(open === undefined ? {} : { open })} {...(onOpenChange === undefined ? {} : { onOpenChange })}>
      {trigger === undefined ? null : <Parts.Trigger asChild>{trigger}</Parts.Trigger>}
      <Parts.Portal>
        <Parts.Overlay className="fixed inset-0 z-50 bg-band-black/45" />
        <Parts.Content
          className={`fixed z-50 flex flex-col border-ink bg-sheet text-ink outline-none ${where}`}
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
        >
          <div className="flex items-start justify-between gap-4 border-b border-rule py-3 pr-3 pl-5">
            <div className="min-w-0 pt-1">
              <Parts.Title className="text-heading font-bold">{title}</Parts.Title>
              {description === undefined ? null : (
                <Parts.Description className="mt-0.5 text-soft">{description}</Parts.Description>
              )}
            </div>
            <Parts.Close
              aria-label="Close"
              className="inline-flex size-9 shrink-0 items-center justify-center text-soft hover:bg-hair hover:text-ink max-sm:size-11"
            >
              <Glyph name="close" />
            </Parts.Close>
          </div>
          {/* Reachable by keyboard, so that long text can be scrolled without a mouse. */}
          <div className="min-h-0 flex-1 overflow-y-auto px-5 py-4" tabIndex={-1}>
            {children}
          </div>
          {actions === undefined ? null : (
            <div className="flex flex-wrap justify-end gap-3 border-t border-rule px-5 py-3.5 max-sm:flex-col-reverse max-sm:items-stretch">
              {actions}
            </div>
          )}
        </Parts.Content>
      </Parts.Portal>
    </Parts.Root>
  );
}

export function DialogClose({ children }: { readonly children: ReactNode }) {
  return <Parts.Close asChild>{children}</Parts.Close>;
}
