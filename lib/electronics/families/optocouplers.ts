/** Optocouplers and vactrols. Across a mains barrier they are safety parts, which the checks treat as such. */
import { pinOut, practice, recalled } from './fact';
import type { OptocouplerFamily } from './family';

const K = 'KiCad 6 symbol, read';

function opto(
  id: string,
  title: string,
  output: OptocouplerFamily['output'],
  pins: string | null,
  units = 1,
): OptocouplerFamily {
  const resistor = output === 'resistor';
  return {
    id,
    kind: 'optocoupler',
    group: 'optocoupler',
    title,
    units,
    pinOut:
      pins === null ? null : practice(pinOut(pins, `${resistor ? 'vactrol' : 'DIP'}-${pins.split(' ').length}`), K),
    output,
    cautions: resistor
      ? [recalled('On-resistance and fall time spread widely between pieces: choose by ear or measure.')]
      : [],
  };
}

const SIX = 'A K NC E C B';

export const OPTOCOUPLER_FAMILIES: readonly OptocouplerFamily[] = [
  ...['4n25', '4n26', '4n27', '4n28', '4n35', '4n36', '4n37', 'til111', 'cny17', 'h11d1'].map((id) =>
    opto(id, 'optocoupler, transistor', 'transistor', SIX),
  ),
  opto('6n135', 'optocoupler, fast transistor', 'transistor', null),
  opto('6n136', 'optocoupler, fast transistor', 'transistor', null),
  opto('6n137', 'optocoupler, logic', 'logic', 'NC A K NC GND VO EN VCC'),
  opto('6n138', 'optocoupler, split Darlington', 'darlington', 'NC A K NC GND VO VB VCC'),
  opto('6n139', 'optocoupler, split Darlington', 'darlington', 'NC A K NC GND VO VB VCC'),
  opto('pc817', 'optocoupler, transistor', 'transistor', 'A K E C'),
  opto('pc827', 'dual optocoupler, transistor', 'transistor', null, 2),
  opto('pc847', 'quad optocoupler, transistor', 'transistor', null, 4),
  opto('h11l1', 'optocoupler, Schmitt logic', 'logic', 'A K NC VO GND VCC'),
  opto('pc900', 'optocoupler, logic', 'logic', null),
  opto('h11f1', 'optocoupler, FET', 'fet', null),
  opto('h11f2', 'optocoupler, FET', 'fet', null),
  opto('h11f3', 'optocoupler, FET', 'fet', null),
  opto('moc3021', 'optocoupler, triac', 'triac', null),
  opto('vtl5c1', 'vactrol, fast', 'resistor', 'K A R R'),
  opto('vtl5c2', 'vactrol', 'resistor', 'K A R R'),
  opto('vtl5c3', 'vactrol', 'resistor', 'K A R R'),
  opto('vtl5c4', 'vactrol, wide', 'resistor', 'K A R R'),
  opto('nsl-32', 'vactrol', 'resistor', 'A K R R'),
  opto('lcr0202', 'vactrol', 'resistor', null),
  opto('lcr0203', 'vactrol', 'resistor', null),
];
