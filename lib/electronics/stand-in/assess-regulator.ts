/** Stand-in checks for linear regulators. */
import type { RegulatorFamily } from '../families/family';
import { type Check, effect, fail, measure, pass, type StandInContext, unknown, weighed } from './check';
import { compareLeads, nameOf } from './pin-comparison';

export function assessRegulator(wanted: RegulatorFamily, offered: RegulatorFamily, context: StandInContext): Check[] {
  return [
    wanted.polarity === offered.polarity
      ? pass('polarity', wanted.polarity, offered.polarity, 'Same polarity.')
      : fail(
          'polarity',
          wanted.polarity,
          offered.polarity,
          `A ${offered.polarity} regulator cannot make a ${wanted.polarity} rail: fitted there it and its load are destroyed.`,
        ),
    voltage(wanted, offered),
    current(wanted, offered),
    compareLeads(wanted, offered, false),
    ...inputAndDropout(wanted, offered, context),
    ...tab(wanted, offered),
    ...offered.cautions
      .filter((caution) => !wanted.cautions.some((own) => own.value === caution.value))
      .map((caution) => effect('caution', nameOf(wanted), nameOf(offered), caution.value)),
  ];
}

function voltage(wanted: RegulatorFamily, offered: RegulatorFamily): Check {
  const say = (volts: number | null): string => (volts === null ? 'adjustable' : measure(volts, 'V'));
  const words = [say(wanted.outputVolts), say(offered.outputVolts)] as const;
  if (wanted.outputVolts === offered.outputVolts) return pass('voltage', ...words, 'Same output voltage.');
  if (offered.outputVolts === null)
    return fail(
      'voltage',
      ...words,
      'An adjustable regulator needs two resistors and has other leads: it does not go into the place of a fixed one.',
    );
  return fail('voltage', ...words, `It makes ${say(offered.outputVolts)} where ${say(wanted.outputVolts)} is wanted.`);
}

function current(wanted: RegulatorFamily, offered: RegulatorFamily): Check {
  const [a, b] = [wanted.outputAmperes, offered.outputAmperes];
  if (a === null || b === null)
    return unknown('current', 'not known', 'not known', 'Its output current is not in the tables.');
  const words = [measure(a.value, 'A'), measure(b.value, 'A')] as const;
  return b.value >= a.value
    ? weighed(pass('current', ...words, 'It carries as much.'), b)
    : unknown('current', ...words, `It carries ${measure(b.value, 'A')} only: does the rail draw less than that?`);
}

function inputAndDropout(wanted: RegulatorFamily, offered: RegulatorFamily, { rails }: StandInContext): Check[] {
  const side = rails.filter((rail) => (wanted.polarity === 'negative' ? rail < 0 : rail > 0)).map(Math.abs);
  const checks: Check[] = [];
  if (side.length === 0) return checks;
  const input = Math.max(...side);
  const { inputMaximumVolts: limit, dropoutVolts: dropout } = offered;
  if (limit !== null) {
    checks.push(
      input > limit.value
        ? weighed(
            fail(
              'input-voltage',
              measure(input, 'V'),
              measure(limit.value, 'V'),
              'The rail is more than its input may have.',
            ),
            limit,
          )
        : weighed(
            pass('input-voltage', measure(input, 'V'), measure(limit.value, 'V'), 'Its input may have the rail.'),
            limit,
          ),
    );
  }
  const out = wanted.outputVolts;
  // A rail at or below the output is the regulator's own rail, not its input: then nothing is said about dropout.
  if (dropout !== null && out !== null && input > out) {
    const room = input - out;
    const words = [measure(room, 'V of room'), measure(dropout.value, 'V')] as const;
    checks.push(
      room < dropout.value
        ? weighed(fail('dropout', ...words, 'It falls out of regulation: the rail leaves it too little room.'), dropout)
        : pass('dropout', ...words, 'The rail leaves it room to regulate.'),
    );
  }
  return checks;
}

function tab(wanted: RegulatorFamily, offered: RegulatorFamily): Check[] {
  if (wanted.tab === offered.tab || offered.tab === null || wanted.tab === null) return [];
  return [
    effect(
      'tab',
      wanted.tab,
      offered.tab,
      `Its tab is on ${offered.tab}, not on ${wanted.tab}: insulate it from the heat sink.`,
    ),
  ];
}
