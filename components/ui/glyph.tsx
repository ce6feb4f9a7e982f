/** Our own small signs, drawn on a 16-unit square in the colour of the text beside them. */

const STROKE = {
  fill: 'none',
  stroke: 'currentColor',
  strokeWidth: 1.6,
  strokeLinecap: 'square',
  strokeLinejoin: 'miter',
} as const;

const GLYPHS = {
  same: (
    <g {...STROKE}>
      <circle cx="8" cy="8" r="6" />
      <path d="M5.4 8.2l1.9 1.9 3.4-4" />
    </g>
  ),
  'drop-in': (
    <g>
      <circle cx="8" cy="8" r="6" {...STROKE} />
      <path d="M8 2.6a5.4 5.4 0 0 1 0 10.8z" fill="currentColor" />
    </g>
  ),
  'with-effect': <path d="M1.8 9.6C3.4 4.6 5.4 4.6 8 8s4.6 3.4 6.2-1.6" {...STROKE} strokeWidth={1.9} />,
  ask: (
    <g>
      <circle cx="8" cy="8" r="6" {...STROKE} strokeLinecap="butt" strokeDasharray="2.4 1.9" />
      <circle cx="8" cy="8" r="1.3" fill="currentColor" />
    </g>
  ),
  refused: <path d="M3.4 3.4l9.2 9.2M12.6 3.4l-9.2 9.2" {...STROKE} strokeWidth={1.9} />,
  note: <path d="M2.5 4h11M2.5 8h11M2.5 12h6" {...STROKE} />,
  look: (
    <g {...STROKE}>
      <path d="M8 1.9L15 14H1z" strokeLinejoin="round" />
      <path d="M8 6.2v3.6M8 11.9v.1" />
    </g>
  ),
  due: <path d="M2 2h12v12z" fill="currentColor" />,
  mark: <path d="M2 14h3.6v-2.2A5.4 5.4 0 1 1 10.4 11.8V14H14" {...STROKE} strokeWidth={1.9} />,
  scan: (
    <path
      d="M1.5 2.5v11M3.6 2.5v11M6.3 2.5v11M8.2 2.5v11M11 2.5v11M14.4 2.5v11"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.1"
    />
  ),
  menu: <path d="M2 4h12M2 8h12M2 12h12" {...STROKE} />,
  close: <path d="M3.5 3.5l9 9M12.5 3.5l-9 9" {...STROKE} />,
  down: <path d="M4 6.2l4 4 4-4" {...STROKE} />,
  previous: <path d="M10 3.5L5.5 8l4.5 4.5" {...STROKE} />,
  next: <path d="M6 3.5L10.5 8 6 12.5" {...STROKE} />,
  copy: (
    <g {...STROKE} strokeWidth={1.3}>
      <path d="M5.5 5.5h8v8h-8z" />
      <path d="M3 10.5h-.5v-8h8V3" />
    </g>
  ),
  erase: (
    <g {...STROKE}>
      <path d="M5.5 3H15v10H5.5L1 8z" />
      <path d="M7.6 5.8l4.4 4.4M12 5.8l-4.4 4.4" strokeWidth={1.3} />
    </g>
  ),
  lamp: (
    <g {...STROKE} strokeWidth={1.4}>
      <path d="M3 14h7M6.5 14V8.5l4-4.5" />
      <path d="M8.4 3.2l4.6 3.6 1.6-3.2-3-2.4z" />
    </g>
  ),
  up: <path d="M8 14V3M4 6.6L8 2.6l4 4" {...STROKE} />,
} as const;

export type GlyphName = keyof typeof GLYPHS;

/** `label` only where no word stands beside the sign; without it the sign is silent to a screen reader. */
export function Glyph({
  name,
  size = 16,
  label,
  className = '',
}: {
  readonly name: GlyphName;
  readonly size?: number;
  readonly label?: string;
  readonly className?: string;
}) {
  const spoken =
    label === undefined ? ({ 'aria-hidden': true } as const) : ({ role: 'img', 'aria-label': label } as const);
  return (
    <svg viewBox="0 0 16 16" width={size} height={size} className={`inline-block shrink-0 ${className}`} {...spoken}>
      {GLYPHS[name]}
    </svg>
  );
}
