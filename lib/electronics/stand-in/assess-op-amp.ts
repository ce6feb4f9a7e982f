/** Stand-in checks for operational amplifiers, by the circuit's rails and the line's use. */
import type { Fact, OpAmpFamily } from '../families/family';
import {
  type Check,
  effect,
  fail,
  measure,
  pass,
  remark,
  spanOf,
  type StandInContext,
  unknown,
  weighed,
} from './check';
import { comparePins, nameOf } from './pin-comparison';
import { checkSupply, supplyRange } from './supply-check';

/** Slew for full swing is 2π·f·peak. Below 10 kHz at full swing audio suffers plainly; above 20 kHz nobody hears it. */
const AUDIO_FLOOR_HERTZ = 10_000;
const AUDIO_TOP_HERTZ = 20_000;

export function assessOpAmp(wanted: OpAmpFamily, offered: OpAmpFamily, context: StandInContext): Check[] {
  return [
    channels(wanted, offered),
    ...familyStep(wanted, offered),
    comparePins(wanted, offered),
    supply(wanted, offered, context),
    outputSwing(wanted, offered, context),
    inputRange(wanted, offered, context),
    bandwidth(wanted, offered),
    slew(wanted, offered, context),
    inputBias(wanted, offered, context),
    unityGain(wanted, offered),
    ...noise(wanted, offered, context),
    ...supplyCurrent(wanted, offered),
    ...phaseReversal(wanted, offered),
    ...offered.cautions
      .filter(() => wanted.id !== offered.id)
      .map((caution) => remark('caution', nameOf(wanted), nameOf(offered), caution.value)),
  ];
}

/** TL06x, TL07x and TL08x are one design in three grades: low power, low noise, general. */
function familyStep(wanted: OpAmpFamily, offered: OpAmpFamily): Check[] {
  const [a, b] = [/^tl0([678])[124]$/.exec(wanted.id), /^tl0([678])[124]$/.exec(offered.id)];
  if (a === null || b === null || a[1] === b[1]) return [];
  const grades: Readonly<Record<string, string>> = {
    '6': 'the low-power grade',
    '7': 'the low-noise grade',
    '8': 'the general grade',
  };
  const words = [grades[a[1] ?? ''] ?? '', grades[b[1] ?? ''] ?? ''] as const;
  return [
    remark(
      'family-step',
      ...words,
      `The ${nameOf(offered)} is ${words[1]} of the same design; the ${nameOf(wanted)} is ${words[0]}.`,
    ),
  ];
}

function channels(wanted: OpAmpFamily, offered: OpAmpFamily): Check {
  const words = [`${wanted.units}`, `${offered.units}`] as const;
  if (wanted.units === offered.units) return pass('channels', ...words, 'Same number of amplifiers.');
  return offered.units > wanted.units
    ? effect('channels', ...words, 'It has more amplifiers than needed: unused ones are tied as followers to ground.')
    : fail('channels', ...words, 'It has too few amplifiers.');
}

function supply(wanted: OpAmpFamily, offered: OpAmpFamily, { rails }: StandInContext): Check {
  const span = spanOf(rails);
  const check = checkSupply(wanted.supply, offered.supply, span, nameOf(offered));
  const [low, high] = [offered.inputAboveNegativeVolts, offered.inputBelowPositiveVolts];
  // A minimum that is only remembered gives way to what the headroom on the datasheet says: inputs blind at half supply.
  if (
    check.outcome === 'unknown' &&
    span !== null &&
    low !== null &&
    high !== null &&
    (span / 2 < low.value || span / 2 > span - high.value)
  ) {
    const why = `On ${measure(span, 'V')} the inputs of the ${nameOf(offered)} do not even work at half the supply: it needs ${measure(Math.max(low.value, high.value), 'V')} of room there.`;
    return weighed(fail('supply', measure(span, 'V'), supplyRange(offered.supply), why), low, high);
  }
  return check;
}

const isSingle = (rails: readonly number[]): boolean => rails.length > 0 && rails.every((rail) => rail >= 0);

/** Volts that the offered part loses against the wanted one, at both rails together. */
function lost(
  wantedLow: Fact<number>,
  wantedHigh: Fact<number>,
  offeredLow: Fact<number>,
  offeredHigh: Fact<number>,
): number {
  return Math.max(0, offeredLow.value - wantedLow.value) + Math.max(0, offeredHigh.value - wantedHigh.value);
}

function outputSwing(wanted: OpAmpFamily, offered: OpAmpFamily, { rails }: StandInContext): Check {
  const [a, b] = [wanted.outputAboveNegativeVolts, wanted.outputBelowPositiveVolts];
  const [c, d] = [offered.outputAboveNegativeVolts, offered.outputBelowPositiveVolts];
  if (a === null || b === null || c === null || d === null)
    return unknown(
      'output-swing',
      margins(a, b),
      margins(c, d),
      'How near its output comes to the rails is not in the tables.',
    );
  const words = [margins(a, b), margins(c, d)] as const;
  const loss = lost(a, b, c, d);
  const span = spanOf(rails);
  if (loss <= 0.15) return pass('output-swing', ...words, 'Its output comes as near to the rails.');
  const short = `Its output stops ${measure(c.value, 'V')} above the lower rail and ${measure(d.value, 'V')} below the upper one`;
  if (span === null) return unknown('output-swing', ...words, `${short}; whether that is enough depends on the rails.`);
  const check =
    loss > 0.2 * span
      ? fail(
          'output-swing',
          ...words,
          `${short}: on ${measure(span, 'V')} that leaves too little swing for a place that wanted ${margins(a, b)}.`,
        )
      : effect('output-swing', ...words, `${short}: it clips ${measure(loss, 'V')} earlier in all.`);
  return weighed(check, c, d);
}

function inputRange(wanted: OpAmpFamily, offered: OpAmpFamily, { rails }: StandInContext): Check {
  const [a, b] = [wanted.inputAboveNegativeVolts, wanted.inputBelowPositiveVolts];
  const [c, d] = [offered.inputAboveNegativeVolts, offered.inputBelowPositiveVolts];
  if (a === null || b === null || c === null || d === null)
    return unknown(
      'input-range',
      margins(a, b),
      margins(c, d),
      'How near its inputs may come to the rails is not in the tables.',
    );
  const words = [margins(a, b), margins(c, d)] as const;
  const loss = lost(a, b, c, d);
  if (loss <= 0.7) return pass('input-range', ...words, 'Its inputs take as much of the supply.');
  const span = spanOf(rails);
  const need = `Its inputs must stay ${measure(c.value, 'V')} above the lower rail and ${measure(d.value, 'V')} below the upper one`;
  if (span === null)
    return unknown('input-range', ...words, `${need}; whether signals keep to that depends on the rails.`);
  if (isSingle(rails) && a.value <= 0.1 && c.value > 0.5)
    return weighed(fail('input-range', ...words, `${need}: on a single supply it cannot see signals near ground.`), c);
  if (loss > 0.2 * span)
    return weighed(fail('input-range', ...words, `${need}: on ${measure(span, 'V')} that is too little.`), c, d);
  return isSingle(rails)
    ? weighed(effect('input-range', ...words, `${need}: keep signals inside.`), c, d)
    : remark('input-range', ...words, `${need}; signals about ground on a split supply keep to that.`);
}

function margins(low: Fact<number> | null, high: Fact<number> | null): string {
  if (low === null || high === null) return 'not known';
  return low.value <= 0.1 && high.value <= 0.1
    ? 'rail to rail'
    : `V−+${measure(low.value, 'V')} to V+−${measure(high.value, 'V')}`;
}

function bandwidth(wanted: OpAmpFamily, offered: OpAmpFamily): Check {
  const [a, b] = [wanted.gainBandwidthMegahertz, offered.gainBandwidthMegahertz];
  if (a === null || b === null)
    return unknown('bandwidth', figure(a, 'MHz'), figure(b, 'MHz'), 'Its gain-bandwidth is not in the tables.');
  const words = [figure(a, 'MHz'), figure(b, 'MHz')] as const;
  return b.value < 0.7 * a.value
    ? effect('bandwidth', ...words, 'It has less gain left at high frequencies: filters and high gains notice.')
    : pass('bandwidth', ...words, 'Gain-bandwidth is enough.');
}

function slew(wanted: OpAmpFamily, offered: OpAmpFamily, { rails, use }: StandInContext): Check {
  const [a, b] = [wanted.slewVoltsPerMicrosecond, offered.slewVoltsPerMicrosecond];
  if (a === null || b === null)
    return unknown('slew-rate', figure(a, 'V/µs'), figure(b, 'V/µs'), 'Its slew rate is not in the tables.');
  const words = [figure(a, 'V/µs'), figure(b, 'V/µs')] as const;
  if (b.value >= 0.7 * a.value) return pass('slew-rate', ...words, 'It is as fast.');
  const span = spanOf(rails);
  const peak = span === null ? null : Math.max(0, span / 2 - (offered.outputBelowPositiveVolts?.value ?? 0));
  const fullSwingHertz = peak === null || peak === 0 ? null : (b.value * 1e6) / (2 * Math.PI * peak);
  if (use === 'audio' && peak !== null && fullSwingHertz !== null) {
    const reach = `It makes full swing of ${measure(peak, 'V')} up to ${measure(fullSwingHertz / 1000, 'kHz')} only`;
    if (fullSwingHertz < AUDIO_FLOOR_HERTZ)
      return weighed(fail('slew-rate', ...words, `${reach}: loud treble turns into triangles.`), b);
    if (fullSwingHertz >= AUDIO_TOP_HERTZ)
      return remark('slew-rate', ...words, 'It is slower, but fast enough for full swing over the whole audio band.');
    return effect('slew-rate', ...words, `${reach}: the loudest treble loses its edge.`);
  }
  return effect('slew-rate', ...words, 'It is slower: steep edges lean, and loud treble loses swing.');
}

function inputBias(wanted: OpAmpFamily, offered: OpAmpFamily, { use }: StandInContext): Check {
  const words = [
    `${wanted.input.value}, ${figure(wanted.biasNanoamperes, 'nA')}`,
    `${offered.input.value}, ${figure(offered.biasNanoamperes, 'nA')}`,
  ] as const;
  const highToLow = wanted.input.value !== 'bipolar' && offered.input.value === 'bipolar';
  if (!highToLow) return pass('input-bias', ...words, 'Its inputs draw no more than the place can bear.');
  if (use === 'timing' || use === 'control') {
    return unknown(
      'input-bias',
      ...words,
      'Does the stage hold or integrate a voltage, or sit behind big resistors? Then the bias current of a bipolar input makes it droop.',
    );
  }
  return effect('input-bias', ...words, 'Bipolar inputs draw bias current: behind big resistors that becomes offset.');
}

function unityGain(wanted: OpAmpFamily, offered: OpAmpFamily): Check {
  const words = [
    wanted.unityGainStable.value ? 'stable at unity gain' : 'not stable at unity gain',
    offered.unityGainStable.value ? 'stable at unity gain' : 'not stable at unity gain',
  ] as const;
  return wanted.unityGainStable.value && !offered.unityGainStable.value
    ? weighed(
        fail('unity-gain', ...words, 'It oscillates as a follower or integrator without an extra capacitor.'),
        offered.unityGainStable,
      )
    : pass('unity-gain', ...words, 'It is as stable at low gain.');
}

function noise(wanted: OpAmpFamily, offered: OpAmpFamily, { use }: StandInContext): Check[] {
  const [a, b] = [wanted.noiseNanovolts, offered.noiseNanovolts];
  if (use !== 'audio' || a === null || b === null) return [];
  const words = [figure(a, 'nV/√Hz'), figure(b, 'nV/√Hz')] as const;
  return b.value > 1.5 * a.value
    ? [effect('noise', ...words, 'It hisses more.')]
    : [pass('noise', ...words, 'It is as quiet.')];
}

function supplyCurrent(wanted: OpAmpFamily, offered: OpAmpFamily): Check[] {
  const [a, b] = [wanted.supplyMilliamperes, offered.supplyMilliamperes];
  if (a === null || b === null || b.value <= 1.5 * a.value) return [];
  const more = (b.value - a.value) * offered.units;
  return [
    remark(
      'supply-current',
      figure(a, 'mA each'),
      figure(b, 'mA each'),
      `Each part draws about ${measure(more, 'mA')} more from the rails.`,
    ),
  ];
}

function phaseReversal(wanted: OpAmpFamily, offered: OpAmpFamily): Check[] {
  if (offered.phaseReversal?.value !== true || wanted.phaseReversal?.value === true) return [];
  return [
    remark(
      'phase-reversal',
      'none',
      'reverses',
      'Its output flips when an input goes below its range: mind comparators and clipped inputs.',
    ),
  ];
}

function figure(fact: Fact<number> | null, unit: string): string {
  return fact === null ? 'not known' : measure(fact.value, unit);
}
