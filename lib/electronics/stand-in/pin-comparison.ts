/** Whether two parts go on the same pins, and for three-lead parts what a builder does when they do not. */
import type { Fact, Family, PinOut } from '../families/family';
import { type Check, effect, fail, pass, unknown, weighed } from './check';

const SAME_PIN: Readonly<Record<string, string>> = { VCC: 'VDD', 'V+': 'VDD', GND: 'VSS', VEE: 'V-' };
const plain = (name: string): string => SAME_PIN[name] ?? name;

/** Gate inputs of one unit may change places, and a lone supply has several names; everything else must agree pin by pin. */
export function samePins(a: PinOut, b: PinOut): boolean {
  if (a.pins.length !== b.pins.length) return false;
  const negativeIsGround = !a.pins.includes('V-') || !b.pins.includes('V-');
  const name = (pin: string): string => {
    const known = plain(pin);
    return negativeIsGround && known === 'V-' ? 'VSS' : known;
  };
  const units = (layout: PinOut): string => gateUnits(layout);
  if (units(a) !== '' && units(a) === units(b)) {
    const isGatePin = (pin: string): boolean => /^[A-HY]\d$/.test(pin);
    return a.pins.every((pin, index) => {
      const other = b.pins[index] ?? '';
      return isGatePin(pin) ? isGatePin(other) : name(pin) === name(other);
    });
  }
  return a.pins.every((pin, index) => name(pin) === name(b.pins[index] ?? ''));
}

/** `1,2>3 5,6>4`, sorted; empty where the part is not made of gates. */
export function gateUnits(layout: PinOut): string {
  // Switches and counters use some of the same letters: only a part whose every pin is a gate's, a supply or free counts.
  if (!layout.pins.every((pin) => /^(?:[A-HY]\d|NC|VDD|VCC|VSS|GND)$/.test(pin))) return '';
  const units = new Map<string, { inputs: number[]; output: number }>();
  layout.pins.forEach((pin, index) => {
    const form = /^([A-HY])(\d)$/.exec(pin);
    const unit = form?.[2];
    if (form === null || unit === undefined) return;
    const entry = units.get(unit) ?? { inputs: [], output: 0 };
    if (form[1] === 'Y') entry.output = index + 1;
    else entry.inputs.push(index + 1);
    units.set(unit, entry);
  });
  const read = [...units.values()];
  if (read.length === 0 || read.some((unit) => unit.output === 0 || unit.inputs.length === 0)) return '';
  return read
    .map((unit) => `${[...unit.inputs].sort((x, y) => x - y).join(',')}>${unit.output}`)
    .sort()
    .join(' ');
}

/** Check for integrated circuits: other pins mean that it does not go into the socket. */
export function comparePins(wanted: Family, offered: Family): Check {
  const [a, b] = [wanted.pinOut, offered.pinOut];
  if (a === null || b === null) {
    return unknown(
      'pin-out',
      describe(a),
      describe(b),
      `The pins of the ${nameOf(a === null ? wanted : offered)} are not in the tables: compare the datasheets before it goes in.`,
    );
  }
  if (samePins(a.value, b.value))
    return weighed(pass('pin-out', describe(a), describe(b), 'Same pins: it goes into the same holes.'), a, b);
  const why =
    a.value.pins.length === b.value.pins.length
      ? `Same number of pins, other functions on them: the ${nameOf(offered)} does not work in the place of a ${nameOf(wanted)} without rewiring.`
      : `A part with ${b.value.pins.length} pins does not fit where ${a.value.pins.length} are wanted.`;
  return weighed(fail('pin-out', describe(a), describe(b), why), a, b);
}

/**
 * Check for three-lead parts. A mirrored part is turned round; other orders mean crossed legs, which is refused where a
 * mistake destroys the circuit (regulators).
 */
export function compareLeads(wanted: Family, offered: Family, crossingAllowed: boolean): Check {
  const [a, b] = [wanted.pinOut, offered.pinOut];
  if (a === null || b === null) {
    return unknown(
      'lead-order',
      describe(a),
      describe(b),
      `The lead order of the ${nameOf(a === null ? wanted : offered)} is not in the tables: measure it or read the maker’s drawing.`,
    );
  }
  const left = a.value.pins.join(' ');
  const right = b.value.pins.join(' ');
  // Sheets of one TO-92 number have been seen with the leads reversed (the BC547’s, from two makers): never fit by table alone.
  const look = b.value.package === 'TO-92' ? ' Check the maker’s drawing before soldering.' : '';
  if (left === right) return weighed(pass('lead-order', describe(a), describe(b), `Same lead order.${look}`), a, b);
  if ([...a.value.pins].reverse().join(' ') === right) {
    const how =
      a.value.package === b.value.package
        ? 'turn it round, flat or marked side where the outline has its back.'
        : 'turn it round, and see that its other case fits.';
    return weighed(
      effect('lead-order', describe(a), describe(b), `The ${nameOf(offered)} has mirrored leads: ${how}${look}`),
      a,
      b,
    );
  }
  if (a.value.pins.length !== b.value.pins.length)
    return weighed(fail('lead-order', describe(a), describe(b), 'It has another number of leads.'), a, b);
  const check = crossingAllowed
    ? effect(
        'lead-order',
        describe(a),
        describe(b),
        `Other lead order (${left} wanted, ${right} offered): the legs must be crossed and sleeved.`,
      )
    : fail(
        'lead-order',
        describe(a),
        describe(b),
        `Other lead order (${left} wanted, ${right} offered): fitted as drawn it would be destroyed.`,
      );
  return weighed(check, a, b);
}

export function nameOf(family: Family): string {
  return /^\d+$/.test(family.id) ? family.id : family.id.toUpperCase();
}

function describe(pins: Fact<PinOut> | null): string {
  if (pins === null) return 'not known';
  return pins.value.pins.length <= 4 ? `${pins.value.pins.join(' ')} (${pins.value.package})` : pins.value.package;
}
