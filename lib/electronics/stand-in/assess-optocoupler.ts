/** Stand-in checks for optocouplers and vactrols away from the mains. */
import type { OptocouplerFamily } from '../families/family';
import { type Check, effect, fail, unknown } from './check';
import { checkUnits } from './assess-logic';
import { comparePins } from './pin-comparison';

export function assessOptocoupler(wanted: OptocouplerFamily, offered: OptocouplerFamily): Check[] {
  if (wanted.output !== offered.output)
    return [
      fail('output-kind', wanted.title, offered.title, `Its output is a ${offered.output}, not a ${wanted.output}.`),
    ];
  return [
    comparePins(wanted, offered),
    checkUnits(wanted.units, offered.units),
    wanted.output === 'resistor'
      ? unknown(
          'response',
          wanted.title,
          offered.title,
          'Vactrols differ in resistance and in how fast they fall: try it by ear.',
        )
      : effect(
          'transfer-ratio',
          wanted.title,
          offered.title,
          'Its current transfer ratio differs: check the current that drives it.',
        ),
  ];
}
