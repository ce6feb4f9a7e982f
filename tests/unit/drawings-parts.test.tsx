/**
 * Drawings are what a hand reaches for in the drawer: a band in the wrong place picks the wrong part. Checked on the
 * markup that reaches the page. Colour codes: IEC 60062:2016 table 1; examples worked from that table by hand.
 */
import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { BAND_COLOURS, type BandColour } from '@/components/drawings/bands';
import { CapacitorDrawing } from '@/components/drawings/capacitor-drawing';
import { DiodeDrawing } from '@/components/drawings/diode-drawing';
import { IcDrawing } from '@/components/drawings/ic-drawing';
import { bandPositions, ResistorDrawing } from '@/components/drawings/resistor-drawing';
import { To92Drawing } from '@/components/drawings/to92-drawing';

function drawn(element: ReactElement): string {
  return renderToStaticMarkup(element);
}

function bandsLeftToRight(markup: string): readonly string[] {
  return [...markup.matchAll(/data-band="(\w+)" x="([\d.]+)"/g)]
    .map((match) => ({ colour: match[1] ?? '', x: Number(match[2]) }))
    .sort((a, b) => a.x - b.x)
    .map(({ colour }) => colour);
}

describe('a drawn resistor', () => {
  it('shows its bands in reading order from the left', () => {
    const bands: BandColour[] = ['yellow', 'violet', 'black', 'brown', 'brown'];
    expect(bandsLeftToRight(drawn(<ResistorDrawing bands={bands} body="blue" name="4.7 kΩ" />))).toEqual(bands);
  });

  it.each([3, 4, 5, 6])('keeps %i bands on the body without one touching the next', (count) => {
    const positions = bandPositions(count);
    expect(positions).toHaveLength(count);
    for (const [index, x] of positions.entries()) {
      expect(x).toBeGreaterThanOrEqual(17);
      expect(x + 4.6).toBeLessThanOrEqual(79);
      const next = positions[index + 1];
      if (next !== undefined) expect(next - x).toBeGreaterThan(4.6 + 1);
    }
  });

  it.each([4, 5])('sets the tolerance band of %i apart, so that the reading end is plain (IEC 60062, 4.1)', (count) => {
    const positions = bandPositions(count);
    const gaps = positions.slice(1).map((x, index) => x - (positions[index] ?? 0));
    const last = gaps.at(-1) ?? 0;
    for (const gap of gaps.slice(0, -1)) expect(last).toBeGreaterThan(gap * 1.3);
  });

  it('has a fill of its own for every colour of the code', () => {
    const fills = BAND_COLOURS.map(
      (colour) => /fill-band-\w+/.exec(drawn(<ResistorDrawing bands={[colour]} body="tan" name="one band" />))?.[0],
    );
    expect(new Set(fills).size).toBe(BAND_COLOURS.length);
    expect(fills).not.toContain(undefined);
  });
});

describe('a drawn capacitor', () => {
  it('bears the code that stands on the part', () => {
    expect(drawn(<CapacitorDrawing shape="disc" mark="104" name="100 nF" />)).toContain('>104</text>');
  });

  it('has a stripe at the negative lead when polarised and none when bipolar', () => {
    const polar = drawn(<CapacitorDrawing shape="can" mark="10µF" second="25V" name="10 µF" />);
    const bipolar = drawn(<CapacitorDrawing shape="can-bipolar" mark="10µF" second="25V" name="10 µF bipolar" />);
    expect(polar).toContain('fill-part-stripe');
    expect(bipolar).not.toContain('fill-part-stripe');
    expect(bipolar).toContain('>BP</text>');
  });

  it('marks the positive lead of a tantalum, where a can marks the negative', () => {
    expect(drawn(<CapacitorDrawing shape="drop" mark="106" name="10 µF tantalum" />)).toContain('>+</text>');
  });
});

describe('a drawn integrated circuit', () => {
  it.each([8, 14, 16, 28, 40])('has all of its %i pins', (pins) => {
    expect(drawn(<IcDrawing pins={pins} mark="X" name="IC" />).match(/data-pin/g)).toHaveLength(pins);
  });

  it('puts the dot of pin 1 below the notch at the left: pins count anticlockwise from above (JEDEC practice)', () => {
    const dot = /<circle cx="([\d.]+)" cy="([\d.]+)"/.exec(drawn(<IcDrawing pins={14} mark="CD4093BE" name="IC" />));
    expect(Number(dot?.[1])).toBeLessThan(15);
    expect(Number(dot?.[2])).toBeGreaterThan(17);
  });

  it('sets a long mark narrower rather than over the edge', () => {
    const markup = drawn(<IcDrawing pins={8} mark="MCP6004T-I/ST-LONG-MARK" name="IC" />);
    const [, length] = /textLength="([\d.]+)"/.exec(markup) ?? [];
    const [, width] = / width="([\d.]+)"/.exec(markup) ?? [];
    expect(Number(length)).toBeGreaterThan(0);
    expect(Number(length)).toBeLessThan(Number(width) - 10);
  });
});

describe('a drawn transistor or diode', () => {
  it('names the leads from left to right, flat face forward', () => {
    const markup = drawn(<To92Drawing leads="CBE" mark="BC547B" name="BC547B" />);
    expect([...markup.matchAll(/>([A-Z?])<\/text>/g)].map((match) => match[1])).toEqual(['C', 'B', 'E']);
  });

  it('shows question marks where the lead order is not known, never a guess', () => {
    const markup = drawn(<To92Drawing leads={null} mark="J112" name="J112" />);
    expect([...markup.matchAll(/>([A-Z?])<\/text>/g)].map((match) => match[1])).toEqual(['?', '?', '?']);
  });

  it('has its band at the lettered cathode end', () => {
    const markup = drawn(<DiodeDrawing body="glass" name="1N4148" />);
    expect(Number(/data-band="black" x="([\d.]+)"/.exec(markup)?.[1])).toBeGreaterThan(48);
    expect(markup).toContain('>K</text>');
  });
});

describe('every drawing', () => {
  it('has a name for who cannot see it, or is silent where the words beside it say it', () => {
    expect(drawn(<IcDrawing pins={8} mark="TL072" name="TL072, 8 pins" />)).toMatch(
      /role="img" aria-label="TL072, 8 pins"/,
    );
    const silent = drawn(<IcDrawing pins={8} mark="TL072" name={null} />);
    expect(silent).toContain('aria-hidden="true"');
    expect(silent).not.toContain('role="img"');
  });
});
