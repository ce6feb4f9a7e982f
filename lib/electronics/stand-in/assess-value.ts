/** Value and tolerance: checks that resistors, capacitors, inductors and potentiometers share. */
import type { PartSpec, Quantity } from '../part-spec';
import { printQuantity } from '../print-quantity';
import { equalQuantity, toNumber } from '../quantity';
import { type Check, effect, fail, pass, remark, type StandInContext, unknown } from './check';

/** Beyond half as much again it is another value, no stand-in. */
const FARTHEST_PERCENT = 50;

const say = (value: Quantity | null): string => (value === null ? 'not said' : printQuantity(value));

export function compareValue(
  wanted: PartSpec,
  offered: PartSpec,
  { lineTolerancePercent, use }: StandInContext,
): Check {
  const [a, b] = [wanted.value, offered.value];
  const words = [say(a), say(b)] as const;
  if (a === null || b === null)
    return unknown('value', ...words, `The ${a === null ? 'wanted' : 'offered'} value is not said.`);
  if (a.unit !== b.unit) return fail('value', ...words, 'They are measured in different units.');
  if (equalQuantity(a, b)) return pass('value', ...words, 'Same value.');
  const wantedValue = toNumber(a);
  if (wantedValue === 0) return fail('value', ...words, 'A link was wanted.');
  const percent = (toNumber(b) / wantedValue - 1) * 100;
  const shown = `${percent > 0 ? '+' : '−'}${Number(Math.abs(percent).toPrecision(3))} %`;
  const bears = lineTolerancePercent ?? wanted.tolerancePercent;
  if (bears !== null && bears !== undefined && Math.abs(percent) <= bears + 1e-9)
    return remark('value', ...words, `${shown}, inside the ${bears} % that the line bears.`);
  const bulk = a.unit === 'farad' && (use === 'decoupling' || use === 'power');
  if (bulk && percent > 0 && percent <= 120)
    return remark('value', ...words, `${shown}: more capacitance on a rail does no harm.`);
  if (Math.abs(percent) > FARTHEST_PERCENT) return fail('value', ...words, `${shown} is another value.`);
  return effect('value', ...words, `${shown}: every figure that it sets moves with it.`);
}

export function compareTolerance(wanted: PartSpec, offered: PartSpec, { use }: StandInContext): Check[] {
  const [a, b] = [wanted.tolerancePercent, offered.tolerancePercent];
  if (a === null) return [];
  const words = [`±${a} %`, b === null ? 'not said' : `±${b} %`] as const;
  if (b === null)
    return [
      a <= 2
        ? unknown('tolerance', ...words, 'Its tolerance is not said, and a close one was wanted.')
        : remark('tolerance', ...words, 'Its tolerance is not said.'),
    ];
  if (b <= a) return [pass('tolerance', ...words, 'As close or closer.')];
  const exacting = use === 'timing' || use === 'control' || use === 'audio' || use === null;
  return [
    exacting
      ? effect('tolerance', ...words, 'It is looser: the figure may land further off; measure one that is near.')
      : remark('tolerance', ...words, 'It is looser, which does not matter here.'),
  ];
}
