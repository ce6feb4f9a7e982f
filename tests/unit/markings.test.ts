/** What stands on a part's body, both ways. Colours: IEC 60062; capacitor codes: common practice. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { capacitorCode, faradsOfCode } from '@/lib/electronics/markings/capacitor-codes';
import { ohmsOfBands, resistorBands } from '@/lib/electronics/markings/colour-bands';
import { numbersOf } from '@/lib/electronics/preferred-values';

describe('bands of a resistor', () => {
  it.each([
    [4700, 5, 'yellow violet red gold'],
    [4700, 1, 'yellow violet black brown brown'],
    [10_000, 1, 'brown black black red brown'],
    [1_000_000, 5, 'brown black green gold'],
    [0.47, 5, 'yellow violet silver gold'],
    [49_900, 1, 'yellow white white red brown'],
    [220, 2, 'red red black black red'],
  ])('%d ohm, %d %% are %s', (ohms, tolerance, bands) => {
    expect(resistorBands(ohms, tolerance)?.join(' ')).toBe(bands);
  });

  it('has none for a value of too many digits or a tolerance without a colour', () => {
    expect(resistorBands(4991, 1)).toBeNull();
    expect(resistorBands(4990, 5)).toBeNull();
    expect(resistorBands(4700, 7)).toBeNull();
    expect(resistorBands(-1, 5)).toBeNull();
  });

  it('read back to the value, for every preferred value of every decade', () => {
    const values = fc.tuple(fc.constantFrom(...numbersOf('E96')), fc.integer({ min: -2, max: 5 }));
    fc.assert(
      fc.property(values, ([number, decade]) => {
        const ohms = Number(`${number}e${decade}`);
        const bands = resistorBands(ohms, 1);
        return bands !== null && Math.abs((ohmsOfBands(bands) ?? 0) / ohms - 1) < 1e-9;
      }),
    );
  });
});

describe('the code on a capacitor', () => {
  it.each([
    [100e-9, '104'],
    [2.2e-9, '222'],
    [22e-12, '220'],
    [4.7e-12, '4.7'],
    [1e-6, '105'],
  ])('%d F is %s', (farads, code) => {
    expect(capacitorCode(farads)).toBe(code);
    expect(faradsOfCode(code)).toBeCloseTo(farads, 15);
  });

  it('has none for three digits or out of its range', () => {
    for (const farads of [1.23e-9, 0.1e-12, 1e-3, 0]) expect(capacitorCode(farads)).toBeNull();
  });
});
