/** What to look for in the drawer: the drawing of a part by its kind, value and family, or its marking in words. */
import { findFamily } from '@/lib/electronics/families/find-family';
import { capacitorCode } from '@/lib/electronics/markings/capacitor-codes';
import { resistorBands } from '@/lib/electronics/markings/colour-bands';
import { CapacitorDrawing, type CapacitorShape } from './capacitor-drawing';
import { ChipDrawing } from './chip-drawing';
import { DiodeDrawing, LedDrawing } from './diode-drawing';
import { IcDrawing } from './ic-drawing';
import { PotDrawing } from './pot-drawing';
import { ResistorDrawing } from './resistor-drawing';
import { To92Drawing } from './to92-drawing';

export interface LookedFor {
  readonly name: string;
  readonly description?: string;
  readonly kind: string;
  readonly partNumber: string | null;
  readonly family: string | null;
  /** Decimal text in the unit's base: ohms, farads. */
  readonly value: string | null;
  readonly tolerancePercent: number | null;
  readonly ratedVolts: number | null;
  readonly dielectric: string | null;
  readonly mounting: string | null;
  readonly package: string | null;
}

/** Null where nothing is drawn for the kind; the caller then shows the part's name alone. */
export function LookOf({ part, scale }: { readonly part: LookedFor; readonly scale?: number }) {
  const size = scale === undefined ? {} : { scale };
  const value = part.value === null ? null : Number(part.value);
  const mark = shortMark(part);
  const surface = part.mounting === 'surface';
  if (part.kind === 'resistor' && value !== null) {
    const tolerance = part.tolerancePercent ?? 5;
    if (surface)
      return <ChipDrawing kind="resistor" mark={chipCode(value)} name={`chip marked ${chipCode(value)}`} {...size} />;
    const bands = resistorBands(value, tolerance);
    if (bands === null) return null;
    const words = bands.join(', ');
    return <ResistorDrawing bands={bands} body={tolerance <= 2 ? 'blue' : 'tan'} name={words} {...size} />;
  }
  if (part.kind === 'capacitor' && value !== null) {
    if (surface) return <ChipDrawing kind="capacitor" mark={null} name="chip without a mark" {...size} />;
    const shape = capacitorShape(part.dielectric);
    const isCan = shape === 'can' || shape === 'can-bipolar';
    const code = isCan ? `${Number((value * 1e6).toPrecision(6))} µF` : (capacitorCode(value) ?? mark);
    const second = isCan && part.ratedVolts !== null ? { second: `${part.ratedVolts} V` } : {};
    return <CapacitorDrawing shape={shape} mark={code} name={`marked ${code}`} {...second} {...size} />;
  }
  if (part.kind === 'potentiometer' || part.kind === 'trimmer')
    return <PotDrawing form={part.kind} mark={mark} name={`marked ${mark}`} {...size} />;
  if (part.kind === 'led')
    return <LedDrawing colour={ledColour(part)} name={`${ledColour(part)} LED, short lead at the flat`} {...size} />;
  if (part.kind === 'diode') {
    const glass = !/^(?:1N40|1N58|1N54|BY|SB|UF)/i.test(mark);
    return <DiodeDrawing body={glass ? 'glass' : 'black'} name={`${mark}, band at the cathode`} {...size} />;
  }
  return <NumberedLook part={part} mark={mark} size={size} />;
}

function NumberedLook({
  part,
  mark,
  size,
}: {
  readonly part: LookedFor;
  readonly mark: string;
  readonly size: { scale?: number };
}) {
  const family = part.family === null ? null : findFamily(part.family);
  const pinOut = family?.pinOut?.value ?? null;
  if (part.kind === 'transistor' && (part.package ?? pinOut?.package ?? 'TO-92') === 'TO-92') {
    const leads = pinOut && pinOut.pins.length === 3 ? pinOut.pins.map((pin) => pin[0] ?? '?').join('') : null;
    const said =
      leads === null ? 'lead order not known' : `leads ${[...leads].join(', ')} from the left, flat side to you`;
    return <To92Drawing leads={leads} mark={mark} name={`${mark}, ${said}`} {...size} />;
  }
  if (['ic', 'optocoupler', 'regulator'].includes(part.kind)) {
    const pins = Number(/-(\d+)$/.exec(part.package ?? '')?.[1] ?? pinOut?.pins.length ?? 8);
    if (pins < 4) return null;
    return <IcDrawing pins={pins} mark={mark} name={`${mark}, ${pins} pins, pin 1 at the dot`} {...size} />;
  }
  return null;
}

const shortMark = (part: LookedFor): string => (part.partNumber ?? part.name).split(/\s+/)[0]?.slice(0, 12) ?? '';

function capacitorShape(dielectric: string | null): CapacitorShape {
  if (dielectric === 'aluminium' || dielectric === 'polymer') return 'can';
  if (dielectric === 'aluminium-bipolar') return 'can-bipolar';
  if (dielectric === 'tantalum') return 'drop';
  if (dielectric !== null && (dielectric.startsWith('poly') || dielectric === 'film')) return 'box';
  return 'disc';
}

/** Two or three digits and noughts, as on chips of 5 % and 1 % (common practice). */
function chipCode(ohms: number): string {
  if (ohms < 10) return String(ohms).replace('.', 'R').padEnd(2, 'R');
  const digits = Number(ohms.toPrecision(2)) === ohms ? 2 : 3;
  const [figures = '', power = '0'] = ohms.toExponential(digits - 1).split('e');
  return `${figures.replace('.', '')}${Number(power) - (digits - 1)}`;
}

const COLOURS = ['red', 'green', 'yellow', 'blue', 'white', 'orange'] as const;

function ledColour(part: LookedFor): (typeof COLOURS)[number] {
  const words = `${part.name} ${part.description ?? ''}`.toLowerCase();
  return COLOURS.find((colour) => words.includes(colour)) ?? 'red';
}
