'use client';
/** A number typed with a thumb, for counting with the other hand in the drawer. Client: it holds the digits. */
import { useState } from 'react';
import { Glyph } from './glyph';

const DIGITS = ['1', '2', '3', '4', '5', '6', '7', '8', '9'] as const;

/** Whole numbers from 0 to `max`. Also takes the keyboard's digits, Backspace and Enter while the focus is inside. */
export function KeyPad({
  label,
  onEnter,
  enterWord = 'OK',
  max = 999_999,
  initial = null,
  busy = false,
  unit,
}: {
  readonly label: string;
  readonly onEnter: (value: number) => void;
  readonly enterWord?: string;
  readonly max?: number;
  readonly initial?: number | null;
  readonly busy?: boolean;
  readonly unit?: string;
}) {
  const [digits, setDigits] = useState(initial === null ? '' : String(initial));

  function type(digit: string) {
    setDigits((before) => {
      const after = before === '0' ? digit : before + digit;
      return Number(after) > max ? before : after;
    });
  }
  function erase() {
    setDigits((before) => before.slice(0, -1));
  }
  function enter() {
    if (digits !== '' && !busy) onEnter(Number(digits));
  }

  const key =
    'flex min-h-12 items-center justify-center border border-edge bg-sheet text-lead font-semibold select-none touch-manipulation hover:bg-copper-wash active:bg-copper-wash';
  return (
    <div
      role="group"
      aria-label={label}
      onKeyDown={(event) => {
        if (event.ctrlKey || event.metaKey || event.altKey) return;
        if (/^[0-9]$/.test(event.key)) type(event.key);
        else if (event.key === 'Backspace') erase();
        // Enter on a key of the pad presses that key, as on any button; on the number it confirms.
        else if (event.key === 'Enter' && event.target instanceof HTMLOutputElement) enter();
        else return;
        event.preventDefault();
      }}
    >
      <output
        tabIndex={0}
        aria-label={`${label}: ${digits === '' ? 'nothing yet' : digits}${unit === undefined ? '' : ` ${unit}`}`}
        className="mb-3 flex min-h-14 items-baseline gap-3 border-b-2 border-ink pb-1 font-mono text-stop font-semibold"
      >
        {digits === '' ? <span className="text-soft">–</span> : digits}
        {unit === undefined ? null : <span className="font-sans text-body font-normal text-soft">{unit}</span>}
      </output>
      <div className="grid grid-cols-3 gap-1.5">
        {DIGITS.map((digit) => (
          <button key={digit} type="button" className={key} onClick={() => type(digit)}>
            {digit}
          </button>
        ))}
        <button type="button" aria-label="Erase the last digit" className={key} onClick={erase}>
          <Glyph name="erase" size={20} />
        </button>
        <button type="button" className={key} onClick={() => type('0')}>
          0
        </button>
        <button
          type="button"
          aria-disabled={digits === '' || busy || undefined}
          className="flex min-h-12 touch-manipulation items-center justify-center border border-copper bg-copper text-lead font-semibold text-sheet select-none hover:bg-copper-deep aria-disabled:opacity-55"
          onClick={enter}
        >
          {enterWord}
        </button>
      </div>
    </div>
  );
}
