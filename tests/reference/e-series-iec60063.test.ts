/**
 * Preferred numbers against the tables of IEC 60063 (Preferred number series for resistors and capacitors). E3 to E24 and
 * E192 with its exception 920 as printed in the standard (from memory, and E24 as many makers reprint it); E96 as published
 * independently in the EIA-96 marking table, code 01 to 96.
 */
import { describe, expect, it } from 'vitest';
import {
  nearestPreferred,
  numbersOf,
  roundToSeries,
  SERIES,
  type Series,
  usualTolerancePercent,
} from '@/lib/electronics/preferred-values';
import { printQuantity } from '@/lib/electronics/print-quantity';
import { readQuantity } from '@/lib/electronics/read-quantity';

const words = (text: string): number[] => text.trim().split(/\s+/).map(Number);

const IEC_60063: Readonly<Record<Series, readonly number[]>> = {
  E3: words(`
    100 220 470
  `),
  E6: words(`
    100 150 220 330 470 680
  `),
  E12: words(`
    100 120 150 180 220 270 330 390 470 560 680 820
  `),
  E24: words(`
    100 110 120 130 150 160 180 200 220 240 270 300 330 360 390 430 470 510 560 620 680 750 820 910
  `),
  E48: words(`
    100 105 110 115 121 127 133 140 147 154 162 169 178 187 196 205 215 226 237 249 261 274 287 301 316
    332 348 365 383 402 422 442 464 487 511 536 562 590 619 649 681 715 750 787 825 866 909 953
  `),
  E96: words(`
    100 102 105 107 110 113 115 118 121 124 127 130 133 137 140 143 147 150 154 158 162 165 169 174 178
    182 187 191 196 200 205 210 215 221 226 232 237 243 249 255 261 267 274 280 287 294 301 309 316 324
    332 340 348 357 365 374 383 392 402 412 422 432 442 453 464 475 487 499 511 523 536 549 562 576 590
    604 619 634 649 665 681 698 715 732 750 768 787 806 825 845 866 887 909 931 953 976
  `),
  E192: words(`
    100 101 102 104 105 106 107 109 110 111 113 114 115 117 118 120 121 123 124 126 127 129 130 132 133
    135 137 138 140 142 143 145 147 149 150 152 154 156 158 160 162 164 165 167 169 172 174 176 178 180
    182 184 187 189 191 193 196 198 200 203 205 208 210 213 215 218 221 223 226 229 232 234 237 240 243
    246 249 252 255 258 261 264 267 271 274 277 280 284 287 291 294 298 301 305 309 312 316 320 324 328
    332 336 340 344 348 352 357 361 365 370 374 379 383 388 392 397 402 407 412 417 422 427 432 437 442
    448 453 459 464 470 475 481 487 493 499 505 511 517 523 530 536 542 549 556 562 569 576 583 590 597
    604 612 619 626 634 642 649 657 665 673 681 690 698 706 715 723 732 741 750 759 768 777 787 796 806
    816 825 835 845 856 866 876 887 898 909 920 931 942 953 965 976 988
  `),
};

/** Nearest by ratio: value, then E6, E12, E24, E48, E96, E192 (worked by hand with logarithms). */
const NEAREST: readonly (readonly [number, ...number[]])[] = [
  [5000, 4700, 4700, 5100, 5110, 4990, 4990],
  [1234, 1500, 1200, 1200, 1210, 1240, 1230],
  [300_000, 330_000, 330_000, 300_000, 301_000, 301_000, 301_000],
];

describe('preferred numbers', () => {
  for (const series of SERIES) {
    it(`${series} is the table of IEC 60063`, () => expect(numbersOf(series)).toEqual(IEC_60063[series]));
  }

  it('rounds by ratio and not by difference', () => {
    for (const [value, ...expected] of NEAREST) {
      const got = (['E6', 'E12', 'E24', 'E48', 'E96', 'E192'] as const).map((series) =>
        nearestPreferred(value, series),
      );
      expect(got, String(value)).toEqual(expected);
    }
  });

  it('rounds what was read, exactly, and rounds it no further the second time', () => {
    for (const text of ['4k99', '50k', '9R6', '98', '1M', '0.97']) {
      const read = readQuantity(text, 'resistor');
      if (!read) throw new Error(`${text} was not read`);
      for (const series of SERIES) {
        const once = roundToSeries(read.quantity, series);
        expect(printQuantity(roundToSeries(once, series))).toBe(printQuantity(once));
      }
    }
  });

  it('is sold in its usual tolerance', () => {
    expect(SERIES.map(usualTolerancePercent)).toEqual([40, 20, 10, 5, 2, 1, 0.5]);
  });
});
