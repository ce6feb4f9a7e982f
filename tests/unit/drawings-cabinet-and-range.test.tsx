/** A drawn cabinet and a drawn effect say in words all that they show. */
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { BandedRange, rangeName } from '@/components/drawings/banded-range';
import { binName, CabinetDrawing, type DrawnBin } from '@/components/drawings/cabinet-drawing';
import { safeCell } from '@/components/grid/safe-cell';
import { gridRequest, gridRequestParameters } from '@/components/grid/grid-request';
import { readSuggestions } from '@/components/shell/find-suggestion';

const bin: DrawnBin = {
  code: 'A-06-1',
  content: '4k7',
  contentName: 'Resistor 4.7 kΩ 1 %',
  fill: 0.12,
  href: '/stores/bins/A-06-1',
  column: 6,
  row: 1,
};

describe('a drawn cabinet', () => {
  it('says code, content, level, stop and due count of a drawer', () => {
    expect(binName({ ...bin, stop: 1, countDue: true })).toBe(
      'Bin A-06-1, Resistor 4.7 kΩ 1 %, about 12 % full, stop 1 of the pick, due for a count',
    );
  });

  it('calls a nearly empty drawer 1 % full and an empty one empty, since the difference sends somebody there', () => {
    expect(binName({ ...bin, fill: 0.001 })).toContain('about 1 % full');
    expect(binName({ ...bin, fill: 0 })).toContain('empty');
  });

  it('keeps every drawer in its own place, whatever order the bins come in', () => {
    const far: DrawnBin = { ...bin, code: 'A-01-2', column: 1, row: 2 };
    const markup = renderToStaticMarkup(<CabinetDrawing label="Cabinet A" columns={13} bins={[far, bin]} />);
    expect(markup.indexOf('A-06-1')).toBeLessThan(markup.indexOf('A-01-2'));
    expect(markup).toContain('grid-column:6 / span 1;grid-row:1');
    expect(markup).toContain('grid-column:1 / span 1;grid-row:2');
  });

  it('draws a level beyond full as full', () => {
    expect(renderToStaticMarkup(<CabinetDrawing label="A" columns={13} bins={[{ ...bin, fill: 1.7 }]} />)).toContain(
      'height:100%',
    );
  });
});

describe('a drawn effect', () => {
  const asked = { percent: 0, lowPercent: -2.4, highPercent: 2.5, text: '4.21 Hz' };

  it('says whether the offered figure lies inside the band', () => {
    const inside = rangeName({
      label: 'Clock rate',
      bandPercent: 5,
      asked,
      offered: { percent: 3.1, text: '4.34 Hz' },
    });
    expect(inside).toContain('4.34 Hz, +3.1 %, inside the band');
    const outside = rangeName({
      label: 'Clock rate',
      bandPercent: 5,
      asked,
      offered: { percent: -7.25, text: '3.9 Hz' },
    });
    expect(outside).toContain('−7.25 %, outside the band');
  });

  it('says that there is no figure where the circuit would not work, instead of drawing one', () => {
    const markup = renderToStaticMarkup(
      <BandedRange label="Clock rate" bandPercent={5} asked={asked} offered={null} />,
    );
    expect(markup).toContain('gives no figure');
    expect(markup).toContain('no figure');
  });

  it('keeps every mark on the drawing, however far out the offered figure lies', () => {
    const markup = renderToStaticMarkup(
      <BandedRange
        label="Corner"
        bandPercent={1}
        asked={asked}
        offered={{ percent: 900, lowPercent: 700, highPercent: 1100, text: '48 Hz' }}
      />,
    );
    for (const [, x] of markup.matchAll(/\b(?:x|cx)="(-?[\d.]+)"/g)) {
      expect(Number(x)).toBeGreaterThanOrEqual(0);
      expect(Number(x)).toBeLessThanOrEqual(380);
    }
  });
});

describe('a cell on its way into a spreadsheet', () => {
  it.each(['=1+2', '+cmd|calc', '-2+3', '@SUM(A1)', '\t=1'])('is kept from being run as a formula: %j', (text) => {
    expect(safeCell(text)).toBe(`'${text}`);
  });

  it.each([
    ['-5', '-5'],
    [-5, '-5'],
    ['R1-R4', 'R1-R4'],
    [null, ''],
    ['+12.5', '+12.5'],
  ])('is left alone where it is harmless: %j', (value, text) => {
    expect(safeCell(value)).toBe(text);
  });
});

describe('a page of rows', () => {
  it('is asked for with its place, its order and its filters', () => {
    const request = gridRequest({
      startRow: 100,
      endRow: 200,
      sortModel: [
        { colId: 'free', sort: 'desc' },
        { colId: 'code', sort: 'asc' },
      ],
      filterModel: {
        code: { filterType: 'text', type: 'contains', filter: 'TL' },
        free: { filterType: 'number', type: 'inRange', filter: 1, filterTo: 9 },
      },
    });
    expect(request.filters).toEqual([
      { column: 'code', type: 'contains', value: 'TL', to: null },
      { column: 'free', type: 'inRange', value: 1, to: 9 },
    ]);
    expect(gridRequestParameters(request).toString()).toBe(
      'start=100&end=200&sort=-free%2Ccode&filter=code%3Acontains%3ATL&filter=free%3AinRange%3A1%3A9',
    );
  });
});

describe('a suggestion of the one field', () => {
  it('is dropped where its address would leave the application', () => {
    const hit = { what: 'part', title: 'TL072CP', detail: '17 free' };
    const hrefs = [
      '/stores/parts/1',
      '//elsewhere.test',
      '/\\elsewhere.test',
      'https://elsewhere.test',
      'javascript:alert(1)',
    ];
    expect(readSuggestions({ hits: hrefs.map((href) => ({ ...hit, href })) }).map(({ href }) => href)).toEqual([
      '/stores/parts/1',
    ]);
  });

  it.each([null, [], { hits: 'none' }, { hits: [{ title: 1 }] }])(
    'is nothing where the answer is misshapen: %j',
    (body) => {
      expect(readSuggestions(body)).toEqual([]);
    },
  );
});
