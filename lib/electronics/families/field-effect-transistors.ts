/** JFETs, whose figures spread five to one within a type, and the small MOSFETs of synthesiser circuits. */
import { noted, pinOut, practice, recalled } from './fact';
import type { Fact, FetFamily } from './family';

// id | jfet/mosfet | channel | lead order with basis | case | VDS | ID | IDSS mA | cut-off V
const TABLE = `
2n5457 | jfet | N | D S G d | TO-92 | 25d | - | 1-5d | 0.5-6d
2n5458 | jfet | N | D S G m | TO-92 | 25m | - | 2-9m | 1-7m
2n5459 | jfet | N | D S G m | TO-92 | 25m | - | 4-16m | 2-8m
2n5460 | jfet | P | - | TO-92 | 40m | - | 1-5m | 0.75-6m
2n5461 | jfet | P | - | TO-92 | 40m | - | 2-9m | 1-7.5m
2n5462 | jfet | P | - | TO-92 | 40m | - | 4-16m | 1.8-9m
2n3819 | jfet | N | - | TO-92 | 25m | - | 2-20m | 0.5-8m
j201 | jfet | N | D S G m | TO-92 | 40m | - | 0.2-1m | 0.3-1.5m
j202 | jfet | N | D S G m | TO-92 | 40m | - | 0.9-4.5m | 0.8-4m
j111 | jfet | N | D S G m | TO-92 | 35m | - | 20-200m | 3-10m
j112 | jfet | N | D S G m | TO-92 | 35p | - | 5-100p | 1-5p
j113 | jfet | N | D S G m | TO-92 | 35m | - | 2-50m | 0.5-3m
j175 | jfet | P | - | TO-92 | 30m | - | 7-60m | 3-6m
j176 | jfet | P | - | TO-92 | 30m | - | 2-25m | 1-4m
bf244a | jfet | N | D G S p | TO-92 | 30p | - | 2-6.5p | 0.4-2.2m
bf244b | jfet | N | D G S p | TO-92 | 30p | - | 6-15p | 1.6-3.8m
bf244c | jfet | N | D G S p | TO-92 | 30p | - | 12-25p | 3.2-7.5m
bf245a | jfet | N | G S D m | TO-92 | 30p | - | 2-6.5p | 0.4-2.2m
bf245b | jfet | N | G S D m | TO-92 | 30p | - | 6-15p | 1.6-3.8m
bf245c | jfet | N | G S D m | TO-92 | 30p | - | 12-25p | 3.2-7.5m
bf256b | jfet | N | - | TO-92 | 30m | - | 6-13m | 0.5-7.5m
2sk30 | jfet | N | - | TO-92 | 50m | - | 0.3-6.5m | 0.4-5m
2sk170 | jfet | N | - | TO-92 | 40m | - | 2.6-20m | 0.2-1.5m
2sk208 | jfet | N | - | SOT-23 | 50m | - | 0.3-6.5m | 0.4-5m
pn4391 | jfet | N | - | TO-92 | 40m | - | 50-150m | 4-10m
pn4392 | jfet | N | - | TO-92 | 40m | - | 25-75m | 2-5m
pn4393 | jfet | N | - | TO-92 | 40m | - | 5-30m | 0.5-3m
mmbfj111 | jfet | N | D S G p | SOT-23 | 35p | - | 20-200m | 3-10p
mmbfj112 | jfet | N | D S G p | SOT-23 | 35p | - | 5-100p | 1-5p
mmbfj113 | jfet | N | D S G p | SOT-23 | 35p | - | 2-50m | 0.5-3p
mmbfj201 | jfet | N | D S G m | SOT-23 | 40m | - | 0.2-1m | 0.3-1.5m
mmbf5457 | jfet | N | D S G m | SOT-23 | 25m | - | 1-5m | 0.5-6m
2n7000 | mosfet | N | S G D p | TO-92 | 60p | 0.2p | - | -
2n7002 | mosfet | N | G S D p | SOT-23 | 60p | 0.115p | - | -
bs170 | mosfet | N | D G S p | TO-92 | 60p | 0.5p | - | -
bs250 | mosfet | P | D G S p | TO-92 | 45p | 0.18p | - | -
bs107 | mosfet | N | D G S p | TO-92 | 200p | 0.25p | - | -
bss138 | mosfet | N | G S D p | SOT-23 | 50p | 0.22p | - | -
bss84 | mosfet | P | G S D p | SOT-23 | 50p | 0.13p | - | -
vp0610 | mosfet | P | S G D p | TO-92 | 60p | 0.18p | - | -
tp0610 | mosfet | P | S G D p | TO-92 | 60p | 0.18p | - | -
irf540 | mosfet | N | G D S p | TO-220 | 100p | 33p | - | -
irf9540 | mosfet | P | G D S p | TO-220 | 100p | 23p | - | -
irf520 | mosfet | N | G D S m | TO-220 | 100m | 9m | - | -
irfz44 | mosfet | N | G D S m | TO-220 | 55m | 49m | - | -
irlz44 | mosfet | N | G D S p | TO-220 | 55p | 47p | - | -
`;

const K = 'KiCad 6 symbol or a read datasheet, with makers’ sheets recalled';
const SELECT = practice(
  'Saturation current and cut-off spread five to one within one type: measure and choose.',
  'every JFET datasheet’s minimum and maximum columns',
);
const BF245_ORDER = practice(
  'Makers disagree on its lead order (G S D and D S G are both in print): measure before fitting.',
  'KiCad 6 symbol against another maker’s sheet recalled',
);

function span(text: string): Fact<readonly [number, number]> | null {
  if (text === '-') return null;
  const [low = '', high = ''] = text.slice(0, -1).split('-');
  const value = [Number(low), Number(high)] as const;
  return text.endsWith('m') ? recalled(value) : practice(value, K);
}

function readRow(line: string): FetFamily {
  const [
    id = '',
    group = '',
    channel = '',
    leads = '-',
    packageName = '',
    volts = '-',
    amperes = '-',
    saturation = '-',
    cutOff = '-',
  ] = line.split('|').map((cell) => cell.trim());
  if ((group !== 'jfet' && group !== 'mosfet') || (channel !== 'N' && channel !== 'P'))
    throw new RangeError(`The field-effect table cannot be read at ${id}.`);
  const order = pinOut(leads.slice(0, -2), packageName);
  return {
    id,
    kind: 'transistor',
    group,
    title: `${group === 'jfet' ? 'JFET' : 'MOSFET'}, ${channel}-channel, ${packageName}`,
    units: 1,
    pinOut:
      leads === '-'
        ? null
        : leads.endsWith('m')
          ? recalled(order, 'datasets and makers disagree or from memory')
          : practice(order, K),
    channel,
    drainSourceVolts: noted(volts, K),
    drainAmperes: noted(amperes, K),
    saturationMilliamperes: span(saturation),
    cutOffVolts: span(cutOff),
    cautions: group === 'jfet' ? (id.startsWith('bf245') ? [SELECT, BF245_ORDER] : [SELECT]) : [],
  };
}

export const FIELD_EFFECT_FAMILIES: readonly FetFamily[] = TABLE.trim().split('\n').map(readRow);
