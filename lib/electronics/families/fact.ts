/** Short ways to write a fact with its basis, for the tables beside this file. */
import type { Basis, Fact, PinOut, Supply } from './family';

export function datasheet<T>(value: T, source: string): Fact<T> {
  return { value, basis: 'datasheet', source };
}

export function practice<T>(value: T, source: string): Fact<T> {
  return { value, basis: 'common-practice', source };
}

export function recalled<T>(value: T, source = 'from memory, to be confirmed in a datasheet'): Fact<T> {
  return { value, basis: 'memory', source };
}

const BASIS_LETTERS: Readonly<Record<string, Basis>> = { d: 'datasheet', p: 'common-practice', m: 'memory' };

/**
 * Reads `36d` as 36 on a datasheet, `3.5m` from memory, `0.2p` common practice, `-` as not known.
 * @throws RangeError for any other text, so that a slip in a table cannot pass for a fact
 */
export function noted(text: string, source: string): Fact<number> | null {
  if (text === '-') return null;
  const basis = BASIS_LETTERS[text.slice(-1)];
  const value = Number(text.slice(0, -1));
  if (basis === undefined || !Number.isFinite(value))
    throw new RangeError(`A table holds "${text}" where a number with its basis belongs.`);
  return { value, basis, source: basis === 'memory' ? 'from memory, to be confirmed in a datasheet' : source };
}

/** Reads `3p 18d 20d`: minimum, maximum, absolute maximum in volts. */
export function supplyOf(text: string, source: string): Supply {
  const [minimum = '-', maximum = '-', absolute = '-'] = text.split(' ');
  return {
    minimumVolts: noted(minimum, source),
    maximumVolts: noted(maximum, source),
    absoluteVolts: noted(absolute, source),
  };
}

/** Pin names in order, parted by spaces. */
export function pinOut(names: string, packageName: string): PinOut {
  return { pins: names.split(' '), package: packageName };
}

const INPUT_NAMES = 'ABCDEFGH';

/**
 * Reads `1,2>3 5,6>4` as gates (inputs > output, pin numbers) into a pin-out of `total` pins.
 */
export function gatePins(
  total: number,
  gates: string,
  positive: readonly [string, number],
  negative: readonly [string, number],
): PinOut {
  const pins = Array.from({ length: total }, () => 'NC');
  gates.split(' ').forEach((gate, index) => {
    const [inputs = '', output = ''] = gate.split('>');
    inputs.split(',').forEach((pin, place) => {
      pins[Number(pin) - 1] = `${INPUT_NAMES[place] ?? '?'}${index + 1}`;
    });
    pins[Number(output) - 1] = `Y${index + 1}`;
  });
  pins[positive[1] - 1] = positive[0];
  pins[negative[1] - 1] = negative[0];
  return { pins, package: `DIP-${total}` };
}
