/** Small-signal, rectifier, Schottky and germanium diodes. Pin 1 is the cathode (the ring). */
import { noted, pinOut, practice, recalled } from './fact';
import type { DiodeFamily, DiodeType, Fact } from './family';

// id | type with basis | reverse V | forward A | leads | case
const TABLE = `
1n4148 | switching p | 100p | 0.15p | 2 | DO-35
1n4448 | switching p | 100p | 0.15p | 2 | DO-35
1n914 | switching p | 100p | 0.2p | 2 | DO-35
bav19 | switching p | 100p | 0.25p | 2 | DO-35
bav20 | switching p | 150p | 0.25p | 2 | DO-35
bav21 | switching p | 200p | 0.25p | 2 | DO-35
bas16 | switching p | 75m | 0.2m | sot | SOT-23
bas21 | switching p | 200p | 0.2p | sot | SOT-23
bav99 | switching p | 70p | 0.2p | bav99 | SOT-23
bav70 | switching p | 70p | 0.2p | bav70 | SOT-23
baw56 | switching p | 70m | 0.2m | - | SOT-23
1n4001 | rectifier p | 50p | 1p | 2 | DO-41
1n4002 | rectifier p | 100p | 1p | 2 | DO-41
1n4003 | rectifier p | 200p | 1p | 2 | DO-41
1n4004 | rectifier p | 400p | 1p | 2 | DO-41
1n4005 | rectifier p | 600p | 1p | 2 | DO-41
1n4006 | rectifier p | 800p | 1p | 2 | DO-41
1n4007 | rectifier p | 1000p | 1p | 2 | DO-41
1n5400 | rectifier p | 50p | 3p | 2 | DO-201
1n5401 | rectifier p | 100p | 3p | 2 | DO-201
1n5402 | rectifier p | 200p | 3p | 2 | DO-201
1n5404 | rectifier p | 400p | 3p | 2 | DO-201
1n5406 | rectifier p | 600p | 3p | 2 | DO-201
1n5407 | rectifier p | 800p | 3p | 2 | DO-201
1n5408 | rectifier p | 1000p | 3p | 2 | DO-201
1n5817 | schottky-power p | 20p | 1p | 2 | DO-41
1n5818 | schottky-power p | 30p | 1p | 2 | DO-41
1n5819 | schottky-power p | 40p | 1p | 2 | DO-41
1n5820 | schottky-power p | 20p | 3p | 2 | DO-201
1n5821 | schottky-power p | 30p | 3p | 2 | DO-201
1n5822 | schottky-power p | 40p | 3p | 2 | DO-201
sb140 | schottky-power p | 40p | 1p | 2 | DO-41
sb160 | schottky-power p | 60p | 1p | 2 | DO-41
bat41 | schottky-small p | 100p | 0.1p | 2 | DO-35
bat42 | schottky-small p | 30p | 0.2p | 2 | DO-35
bat43 | schottky-small p | 30p | 0.2p | 2 | DO-35
bat46 | schottky-small p | 100p | 0.15p | 2 | DO-35
bat48 | schottky-small p | 40p | 0.35p | 2 | DO-35
bat85 | schottky-small p | 30p | 0.2p | 2 | DO-35
bat86 | schottky-small p | 50p | 0.2p | 2 | DO-35
bat54 | schottky-small p | 30p | 0.2p | sot | SOT-23
bat54s | schottky-small p | 30p | 0.2p | - | SOT-23
bat54c | schottky-small p | 30p | 0.2p | - | SOT-23
bat54a | schottky-small p | 30p | 0.2p | - | SOT-23
bas40 | schottky-small p | 40m | 0.12m | - | SOT-23
1n34 | germanium p | 60m | 0.05m | 2 | DO-7
1n60 | germanium p | 40m | 0.05m | 2 | DO-7
1n270 | germanium p | 80m | 0.04m | 2 | DO-7
oa90 | germanium p | 20m | 0.01m | 2 | DO-7
oa91 | germanium p | 90m | 0.05m | 2 | DO-7
oa95 | germanium p | 90m | 0.05m | 2 | DO-7
aa119 | germanium p | 30m | 0.035m | 2 | DO-7
1n457 | low-leakage p | 70m | 0.2m | 2 | DO-35
fdh300 | low-leakage p | 125m | 0.2m | 2 | DO-35
1n3595 | low-leakage p | 125m | 0.15m | 2 | DO-35
bav199 | low-leakage p | 70m | 0.16m | - | SOT-23
bav45 | low-leakage p | 20m | 0.05m | 2 | TO-18
`;

const K = 'KiCad 6 description, read, with datasheets recalled';
const TYPES: readonly DiodeType[] = [
  'switching',
  'rectifier',
  'schottky-small',
  'schottky-power',
  'germanium',
  'low-leakage',
];
const TITLES: Readonly<Record<DiodeType, string>> = {
  switching: 'switching diode',
  rectifier: 'rectifier',
  'schottky-small': 'small Schottky diode',
  'schottky-power': 'Schottky rectifier',
  germanium: 'germanium diode',
  'low-leakage': 'low-leakage diode',
};
const ORDERS: Readonly<Record<string, string>> = { '2': 'K A', sot: 'A NC K', bav99: 'K A KA', bav70: 'A1 A2 K' };
const CONTINUOUS: Readonly<Record<string, readonly Fact<string>[]>> = {
  '1n4148': [recalled('100 V is the repetitive peak; continuous reverse voltage is 75 V.')],
};

function readRow(line: string): DiodeFamily {
  const [id = '', typeCell = '', reverse = '-', forward = '-', leads = '-', packageName = ''] = line
    .split('|')
    .map((cell) => cell.trim());
  const diodeType = TYPES.find((type) => typeCell === `${type} p`);
  if (diodeType === undefined) throw new RangeError(`The diode table holds the type "${typeCell}".`);
  const order = ORDERS[leads];
  return {
    id,
    kind: 'diode',
    group: 'diode',
    title: TITLES[diodeType],
    units: order === undefined || leads.startsWith('bav') ? 2 : 1,
    pinOut: order === undefined ? null : practice(pinOut(order, packageName), K),
    diodeType: practice(diodeType, 'the kind under which every maker lists the number'),
    reverseVolts: noted(reverse, K),
    forwardAmperes: noted(forward, K),
    cautions: CONTINUOUS[id] ?? [],
  };
}

export const DIODE_FAMILIES: readonly DiodeFamily[] = TABLE.trim().split('\n').map(readRow);
