/** What every drawing of a part shares: its size on the page and its name for those who cannot see it. */
import type { ReactNode } from 'react';

export interface DrawingSize {
  /** 1 fits a 38-pixel row; the phone's single stop uses 2. */
  readonly scale?: number;
  /** What the drawing shows; null where the words beside it say it already. */
  readonly name: string | null;
}

export function DrawingFrame({
  width,
  height,
  scale = 1,
  name,
  children,
}: DrawingSize & { readonly width: number; readonly height: number; readonly children: ReactNode }) {
  const spoken = name === null ? ({ 'aria-hidden': true } as const) : ({ role: 'img', 'aria-label': name } as const);
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      width={width * scale}
      height={height * scale}
      className="inline-block max-w-full shrink-0 print:[print-color-adjust:exact]"
      {...spoken}
    >
      {children}
    </svg>
  );
}

/** Text on a body: the print a builder reads under the lens. `x`, `y` are its middle. */
export function Print({
  x,
  y,
  size,
  fill = 'fill-part-print',
  anchor = 'middle',
  weight = 600,
  fit,
  children,
}: {
  readonly x: number;
  readonly y: number;
  readonly size: number;
  readonly fill?: string;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly weight?: 400 | 600;
  /** Widest the text may be; longer text is set narrower rather than running over the edge. */
  readonly fit?: number;
  readonly children: string;
}) {
  // 0.62 em is the advance of one character in the values' typeface.
  const natural = children.length * size * 0.62;
  const squeezed =
    fit !== undefined && natural > fit ? { textLength: fit, lengthAdjust: 'spacingAndGlyphs' as const } : {};
  return (
    <text
      x={x}
      y={y}
      fontSize={size}
      fontWeight={weight}
      textAnchor={anchor}
      dominantBaseline="central"
      className={`font-mono ${fill}`}
      {...squeezed}
    >
      {children}
    </text>
  );
}
