/**
 * Short notices for the pick, the receipt and the label: what can hurt, and what spoils a part. Common practice; the
 * maker's datasheet and the local electrical code decide. Pure.
 */
import { findFamily } from '@/lib/electronics/families/find-family';

export interface CautionedPart {
  readonly name: string;
  readonly description: string;
  readonly kind: string;
  readonly family: string | null;
  readonly dielectric: string | null;
  readonly ratedVolts: number | null;
  readonly stockUnit: string;
  readonly safety: boolean;
}

export interface PartCaution {
  readonly code: 'mains' | 'lithium' | 'fume' | 'polarity' | 'static';
  /** `danger` can hurt or burn; `care` spoils a part. */
  readonly level: 'danger' | 'care';
  readonly says: string;
}

const POLAR_DIELECTRICS = ['aluminium', 'polymer', 'tantalum'];
const LITHIUM = /\b(?:CR|BR|LIR|ER)\d{4}\b|\blithium\b|\bli-?ion\b|\bli-?po\b/i;
const SOLDER = /\bsolder\b|\bSn\d{2}Pb\d{2}\b|\bflux\b/i;

/** In order of danger; an empty list for a part that asks for no more than usual care. */
export function partCautions(part: CautionedPart): PartCaution[] {
  const cautions: PartCaution[] = [];
  const text = `${part.name} ${part.description}`;
  if (part.safety) {
    cautions.push({
      code: 'mains',
      level: 'danger',
      says: 'Mains or isolation part: exactly this one, no stand-in. The local electrical code and a licensed person decide.',
    });
  }
  if (LITHIUM.test(text)) {
    cautions.push({
      code: 'lithium',
      level: 'danger',
      says: 'Lithium cell: don’t short, solder or bend it; keep it off metal and away from children.',
    });
  }
  if (SOLDER.test(text)) {
    cautions.push({
      code: 'fume',
      level: 'danger',
      says: 'Solder and flux: draw the fume off; wash your hands after leaded solder.',
    });
  }
  if (part.kind === 'capacitor' && POLAR_DIELECTRICS.includes(part.dielectric ?? '')) {
    const volts = part.ratedVolts === null ? 'its rated voltage' : `${part.ratedVolts} V at most`;
    cautions.push({ code: 'polarity', level: 'care', says: `Mind polarity, and ${volts}.` });
  } else if (part.kind === 'diode' || part.kind === 'led') {
    cautions.push({ code: 'polarity', level: 'care', says: 'Mind polarity: the band or the flat is the cathode.' });
  }
  if (isStaticSensitive(part)) {
    cautions.push({
      code: 'static',
      level: 'care',
      says: 'Sensitive to static: earth yourself, leave it in its foam until it is fitted.',
    });
  }
  return cautions;
}

function isStaticSensitive({ kind, family }: CautionedPart): boolean {
  if (kind === 'ic') return true;
  return kind === 'transistor' && family !== null && findFamily(family)?.group === 'mosfet';
}
