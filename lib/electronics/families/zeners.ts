/** Zener diodes: the 1N47xx and 1N52xx ladders, and the European series that write their voltage in the number. */
import { pinOut, practice } from './fact';
import type { ZenerFamily } from './family';
import { ZENER_1N47, ZENER_1N52, ZENER_EUROPEAN, ZENER_SERIES } from './spellings';

const LADDER = 'the ladder of the series: E24 steps for 1N4728A to 1N4764A, the voltage code in European numbers';
const POWER: Readonly<Record<string, readonly [number, string]>> = {
  bzx55: [0.5, 'DO-35'],
  bzx79: [0.5, 'DO-35'],
  bzx84: [0.25, 'SOT-23'],
  bzx85: [1.3, 'DO-41'],
  bzv55: [0.5, 'SOD-80'],
  bzv85: [1.3, 'DO-41'],
  bzt52: [0.5, 'SOD-123'],
};

/** `5V1` as 5.1, `12` as 12. */
function voltsOf(code: string): number {
  return Number(code.replace('V', '.'));
}

function zener(id: string, volts: number, watts: number, packageName: string): ZenerFamily {
  return {
    id,
    kind: 'diode',
    group: 'zener',
    title: `Zener ${volts} V, ${watts} W`,
    units: 1,
    pinOut: practice(
      pinOut(packageName === 'SOT-23' ? 'A NC K' : 'K A', packageName),
      'KiCad 6 symbol, read; the ring is the cathode',
    ),
    zenerVolts: practice(volts, LADDER),
    watts: practice(watts, 'the series’ rating in every maker’s sheet'),
    cautions: [],
  };
}

export const ZENER_FAMILIES: readonly ZenerFamily[] = [
  ...ZENER_1N47.map((code, index) => zener(`1n${4728 + index}`, voltsOf(code), 1, 'DO-41')),
  ...ZENER_1N52.map((code, index) => zener(`1n${5221 + index}`, voltsOf(code), 0.5, 'DO-35')),
  ...ZENER_SERIES.flatMap((series) => {
    const [watts, packageName] = POWER[series] ?? [0.5, 'DO-35'];
    return ZENER_EUROPEAN.map((code) => zener(`${series}-${code.toLowerCase()}`, voltsOf(code), watts, packageName));
  }),
];
