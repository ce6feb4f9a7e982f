/** Through hole, surface or panel, and the case. */
import type { Family } from '../families/family';
import type { Mounting, PartSpec } from '../part-spec';
import { type Check, effect, fail, pass, remark, type StandInContext } from './check';

const SURFACE = /^(?:SOT|SOD|SO-|SOIC|SOP|TSSOP|SSOP|MSOP|QFN|VSSOP|0201|0402|0603|0805|1206|1210|1812|2010|2512)/i;
const THROUGH = /^(?:DIP|PDIP|TO-|DO-|SIP|AXIAL|RADIAL)/i;
const SURFACE_TOO = /^TO-(?:252|263)/i;

function mountingOf(spec: PartSpec, family: Family | null): Mounting | null {
  if (spec.mounting !== null) return spec.mounting;
  const packageName = spec.package ?? (isDiscrete(family) ? family?.pinOut?.value.package : null) ?? null;
  if (packageName === null) return null;
  if (SURFACE.test(packageName) || SURFACE_TOO.test(packageName)) return 'surface';
  return THROUGH.test(packageName) ? 'through-hole' : null;
}

/** The number of a discrete part names its case (BC847 is SOT-23); that of an integrated circuit does not. */
function isDiscrete(family: Family | null): boolean {
  return family !== null && ['bipolar', 'jfet', 'mosfet', 'diode', 'zener'].includes(family.group);
}

export function checkMounting(
  wanted: PartSpec,
  offered: PartSpec,
  families: readonly [Family | null, Family | null],
  context: StandInContext,
): Check[] {
  const a = context.mounting ?? mountingOf(wanted, families[0]);
  const b = mountingOf(offered, families[1]);
  if (a === null || b === null) return [];
  const words = [a, b] as const;
  if (a === b) return [pass('mounting', ...words, 'It mounts the same way.')];
  const circuit = wanted.kind === 'ic' || wanted.kind === 'optocoupler';
  if (circuit && a === 'through-hole' && b === 'surface')
    return [effect('mounting', ...words, 'A surface part in a through-hole place needs an adapter board.')];
  return [fail('mounting', ...words, `A ${b} part does not go into a ${a} place.`)];
}

export function checkPackage(wanted: PartSpec, offered: PartSpec): Check[] {
  const [a, b] = [wanted.package, offered.package];
  if (a === null || b === null) return [];
  if (a.toUpperCase() === b.toUpperCase()) return [pass('package', a, b, 'Same case.')];
  if (/^\d{4}$/.test(a) && /^\d{4}$/.test(b))
    return [effect('package', a, b, 'Another chip size: see whether it sits on the pads.')];
  return [remark('package', a, b, 'Another case: see whether it fits the board.')];
}
