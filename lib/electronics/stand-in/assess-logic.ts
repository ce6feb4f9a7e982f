/** Stand-in checks for gates, flip-flops, counters and analogue switches. */
import type { LogicFamily, SchmittThreshold, SwitchFamily } from '../families/family';
import {
  type Check,
  effect,
  fail,
  highestRail,
  measure,
  pass,
  remark,
  spanOf,
  type StandInContext,
  unknown,
  weighed,
} from './check';
import { comparePins, nameOf } from './pin-comparison';
import { checkSupply, checkSupply4000, splitSupplyRemark } from './supply-check';

export function assessLogic(wanted: LogicFamily, offered: LogicFamily, context: StandInContext): Check[] {
  // Logic stands between ground and the highest rail; a split supply does not double it.
  const volts = highestRail(context.rails);
  const supply = checkSupply(wanted.supply, offered.supply, volts, nameOf(offered));
  const same = wanted.unitFunction === offered.unitFunction;
  return [
    same
      ? pass('unit-function', wanted.title, offered.title, 'Each unit does the same.')
      : fail(
          'unit-function',
          wanted.title,
          offered.title,
          `A ${offered.title} does another thing than a ${wanted.title}.`,
        ),
    ...(same ? [checkUnits(wanted.units, offered.units)] : []),
    checkSchmitt(wanted, offered, context),
    comparePins(wanted, offered),
    offered.series === '4000' ? checkSupply4000(supply, volts) : supply,
    ...checkOutput(wanted, offered),
    ...checkBuffering(wanted, offered, context),
    ...checkLevels(wanted, offered, context),
  ];
}

export function checkUnits(wanted: number, offered: number): Check {
  const words = [String(wanted), String(offered)] as const;
  if (offered === wanted) return pass('units', ...words, 'Same number of units.');
  return offered > wanted
    ? remark('units', ...words, 'It has more units than needed: tie off the inputs of the unused ones.')
    : fail('units', ...words, 'It has too few units.');
}

function checkSchmitt(wanted: LogicFamily, offered: LogicFamily, { use, rails }: StandInContext): Check {
  const words = [
    wanted.schmittInputs.value ? 'Schmitt inputs' : 'plain inputs',
    offered.schmittInputs.value ? 'Schmitt inputs' : 'plain inputs',
  ] as const;
  if (wanted.schmittInputs.value && !offered.schmittInputs.value) {
    if (use === 'timing')
      return fail(
        'schmitt-inputs',
        ...words,
        'Without Schmitt inputs an RC oscillator of one gate does not start, or sings at a frequency of its own.',
      );
    if (use === 'audio' || use === 'control')
      return fail(
        'schmitt-inputs',
        ...words,
        'A plain gate chatters on slow edges; the Schmitt inputs are there for that.',
      );
    if (use === 'logic')
      return effect(
        'schmitt-inputs',
        ...words,
        'Works only where every input gets clean, fast edges from another gate.',
      );
    return unknown(
      'schmitt-inputs',
      ...words,
      'Is the gate used for timing or on slow edges? Then a plain one will not do.',
    );
  }
  if (!wanted.schmittInputs.value && offered.schmittInputs.value) {
    if (wanted.unbuffered && (use === 'audio' || use === 'timing'))
      return fail(
        'schmitt-inputs',
        ...words,
        'As an amplifier or crystal oscillator an unbuffered inverter cannot be replaced by a Schmitt one.',
      );
    return use === 'timing'
      ? effect(
          'schmitt-inputs',
          ...words,
          'Schmitt inputs switch later and cleaner: where an RC sets the time, the time changes.',
        )
      : remark('schmitt-inputs', ...words, 'Schmitt inputs do all that plain ones do, with cleaner edges.');
  }
  if (wanted.schmittInputs.value && wanted.id !== offered.id && use === 'timing')
    return thresholdShift(wanted, offered, highestRail(rails), words);
  return pass('schmitt-inputs', ...words, 'Same kind of inputs.');
}

function thresholdShift(
  wanted: LogicFamily,
  offered: LogicFamily,
  volts: number | null,
  words: readonly [string, string],
): Check {
  const [before, after] = [thresholdAt(wanted.thresholds, volts), thresholdAt(offered.thresholds, volts)];
  if (before === null || after === null)
    return effect(
      'schmitt-inputs',
      ...words,
      'Both have Schmitt inputs, but their thresholds differ: an RC oscillator changes its frequency.',
    );
  const cents = Math.round(1200 * Math.log2(periodPerRc(before) / periodPerRc(after)));
  const direction = cents >= 0 ? 'higher' : 'lower';
  return effect(
    'schmitt-inputs',
    ...words,
    `Other thresholds: an RC oscillator runs about ${Math.abs(cents)} cents ${direction} with typical parts.`,
  );
}

/** The row measured nearest to the supply, and only within 15 % of it: thresholds do not scale exactly. */
export function thresholdAt(rows: readonly SchmittThreshold[], volts: number | null): SchmittThreshold | null {
  if (volts === null) return null;
  const near = rows.filter((row) => Math.abs(row.supplyVolts - volts) <= 0.15 * volts);
  return near.sort((a, b) => Math.abs(a.supplyVolts - volts) - Math.abs(b.supplyVolts - volts))[0] ?? null;
}

/** Period of the one-gate RC oscillator over R·C, for thresholds at their own supply. */
export function periodPerRc({ supplyVolts, upVolts, downVolts }: SchmittThreshold): number {
  return Math.log((supplyVolts - downVolts) / (supplyVolts - upVolts)) + Math.log(upVolts / downVolts);
}

function checkOutput(wanted: LogicFamily, offered: LogicFamily): Check[] {
  const [a, b] = [wanted.openDrain, offered.openDrain];
  if (a.value === b.value) return [];
  const words = [a.value ? 'open drain' : 'push-pull', b.value ? 'open drain' : 'push-pull'] as const;
  const why = b.value
    ? 'Its outputs only pull down: without pull-up resistors nothing goes high.'
    : 'Push-pull outputs tied together fight each other.';
  return [weighed(fail('output-kind', ...words, why), a, b)];
}

function checkBuffering(wanted: LogicFamily, offered: LogicFamily, { use }: StandInContext): Check[] {
  if (wanted.unbuffered === offered.unbuffered) return [];
  const words = [
    wanted.unbuffered ? 'unbuffered' : 'buffered',
    offered.unbuffered ? 'unbuffered' : 'buffered',
  ] as const;
  if (!wanted.unbuffered)
    return [remark('buffering', ...words, 'An unbuffered gate is slower at its edges; as logic it serves.')];
  if (use === 'logic') return [remark('buffering', ...words, 'As logic a buffered gate serves as well.')];
  if (use === 'audio' || use === 'timing')
    return [
      fail(
        'buffering',
        ...words,
        'As an amplifier or oscillator the unbuffered type is needed; a buffered one has too much gain and howls.',
      ),
    ];
  return [
    unknown('buffering', ...words, 'Is the gate used as an amplifier or oscillator? Then it must stay unbuffered.'),
  ];
}

function checkLevels(wanted: LogicFamily, offered: LogicFamily, { use }: StandInContext): Check[] {
  if (wanted.series === offered.series) return [];
  const words = [seriesName(wanted.series), seriesName(offered.series)] as const;
  const ttl = (family: LogicFamily): boolean =>
    family.series === 'hct' || family.series === 'ls' || family.series === 'ttl';
  if (ttl(offered) && !ttl(wanted)) {
    return [
      use === 'timing'
        ? fail(
            'input-levels',
            ...words,
            'Its inputs switch near 1.4 V instead of half the supply: every RC time comes out wrong.',
          )
        : effect('input-levels', ...words, 'Its inputs switch at TTL levels, near 1.4 V instead of half the supply.'),
    ];
  }
  if (ttl(wanted) && !ttl(offered))
    return [unknown('input-levels', ...words, 'Do TTL outputs feed it? Their high may be too low for CMOS inputs.')];
  return offered.series === '4000'
    ? [effect('drive', ...words, 'A 4000-series part is slower and drives about a tenth of the current of 74HC.')]
    : [remark('drive', ...words, 'Faster edges and stronger outputs: decouple it closely.')];
}

function seriesName(series: LogicFamily['series']): string {
  return series === '4000' ? '4000 series' : series === 'ttl' ? '74' : `74${series.toUpperCase()}`;
}

export function assessSwitch(wanted: SwitchFamily, offered: SwitchFamily, context: StandInContext): Check[] {
  const volts = highestRail(context.rails);
  const split =
    offered.supply.maximumVolts !== null && (spanOf(context.rails) ?? 0) <= offered.supply.maximumVolts.value;
  const seen = offered.id.startsWith('dg') || split ? spanOf(context.rails) : volts;
  const remarkSplit = splitSupplyRemark(
    context.rails,
    volts,
    spanOf(context.rails),
    offered.supply.maximumVolts?.value ?? null,
  );
  return [
    wanted.unitFunction === offered.unitFunction
      ? pass('unit-function', wanted.title, offered.title, 'Each switch does the same.')
      : fail(
          'unit-function',
          wanted.title,
          offered.title,
          `A ${offered.title} switches otherwise than a ${wanted.title}.`,
        ),
    checkUnits(wanted.units, offered.units),
    comparePins(wanted, offered),
    checkSupply(wanted.supply, offered.supply, seen, nameOf(offered)),
    ...(remarkSplit === null ? [] : [remarkSplit]),
    checkOnResistance(wanted, offered),
  ];
}

function checkOnResistance(wanted: SwitchFamily, offered: SwitchFamily): Check {
  const [a, b] = [wanted.onOhms, offered.onOhms];
  if (a === null || b === null)
    return remark(
      'on-resistance',
      'not known',
      'not known',
      'Their on-resistances are not in the tables: it matters where little resistance stands beside the switch.',
    );
  const words = [measure(a.value, 'Ω'), measure(b.value, 'Ω')] as const;
  return b.value > 1.5 * a.value
    ? effect(
        'on-resistance',
        ...words,
        'It has much more resistance when closed, and that resistance moves with the signal.',
      )
    : pass('on-resistance', ...words, 'Its on-resistance is no higher.');
}
