/** The demo workshop's catalogue: about 400 parts of the kinds a module builder keeps, as texts that the reader understands. */
import type { PartKind } from '@/lib/electronics/part-spec';

export interface DemoPart {
  readonly name: string;
  readonly text: string;
  readonly kind: PartKind;
  readonly description: string;
  /** Units on the shelf at the start; 0 keeps it in the catalogue only. */
  readonly stock: number;
  /** Price of one unit in euro at a small quantity. */
  readonly price: string;
  readonly reorderPoint?: number;
  readonly reorderQuantity?: number;
}

/** The same shelf on every machine: a small linear congruential generator (Numerical Recipes' constants). */
function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
}

const random = seeded(4600);
const between = (low: number, high: number): number => Math.round(low + random() * (high - low));

const E12 = ['10', '12', '15', '18', '22', '27', '33', '39', '47', '56', '68', '82'] as const;

/** `47`, decade 2 → `4k7`: two figures with the IEC 60062 letter in the place of the point. */
function resistorCode(figures: string, decade: number): string {
  const letter = decade < 2 ? 'R' : decade < 5 ? 'k' : 'M';
  const place = decade < 2 ? decade : (decade - 2) % 3;
  if (place === 0) return decade < 2 ? `${figures}R` : `${figures[0]}${letter}${figures[1]}`;
  if (place === 1) return decade < 2 ? `${figures}0R` : `${figures}${letter}`;
  return `${figures}0${letter}`;
}

const resistors: DemoPart[] = [0, 1, 2, 3, 4, 5].flatMap((decade) =>
  E12.filter((figures) => decade < 5 || ['10', '15', '22', '33', '47'].includes(figures)).map((figures) => {
    const code = resistorCode(figures, decade);
    return {
      name: `${code} 1 %`,
      text: `${code} 1% 0.25W metal film`,
      kind: 'resistor' as const,
      description: 'metal film, 0.25 W, through-hole',
      stock: ['10', '22', '47', '33'].includes(figures) ? between(180, 420) : random() < 0.2 ? 0 : between(40, 160),
      price: '0.018',
      ...(['10', '22', '47'].includes(figures) ? { reorderPoint: 100, reorderQuantity: 200 } : {}),
    };
  }),
);

const extraResistors: DemoPart[] = ['100R', '220R', '1k', '4k7', '10k', '47k', '100k', '1M'].map((code) => ({
  name: `${code} 5 %`,
  text: `${code} 5% 0.25W carbon film`,
  kind: 'resistor',
  description: 'carbon film, 0.25 W, through-hole',
  stock: between(60, 300),
  price: '0.009',
}));

const list = (
  kind: PartKind,
  description: string,
  rows: readonly (readonly [name: string, text: string, stock: number, price: string, reorderPoint?: number])[],
): DemoPart[] =>
  rows.map(([name, text, stock, price, reorderPoint]) => ({
    name,
    text,
    kind,
    description,
    stock,
    price,
    ...(reorderPoint === undefined ? {} : { reorderPoint, reorderQuantity: reorderPoint * 2 }),
  }));

const ceramics = [
  ...list(
    'capacitor',
    'ceramic C0G, through-hole',
    ['10p', '15p', '22p', '33p', '47p', '68p', '100p', '150p', '220p', '330p', '470p', '680p', '1n', '2n2'].map(
      (code, index) =>
        [`${code} C0G`, `${code} C0G 50V 5%`, index % 4 === 1 ? 0 : 40 + ((index * 37) % 90), '0.042'] as const,
    ),
  ),
  ...list(
    'capacitor',
    'ceramic X7R, through-hole',
    ['1n', '2n2', '4n7', '10n', '22n', '47n', '220n', '470n', '1u'].map(
      (code, index) => [`${code} X7R`, `${code} X7R 50V 10%`, 30 + ((index * 53) % 120), '0.03'] as const,
    ),
  ),
  ...list('capacitor', 'ceramic X7R, through-hole', [
    ['100n X7R', '100n X7R 50V 10%', 386, '0.024', 150],
    ['100n X7R 63 V', '100n X7R 63V 10%', 96, '0.028'],
    ['2n2 Z5U', '2n2 Z5U 50V 20%', 44, '0.015'],
    ['10n Y5V', '10n Y5V 50V', 38, '0.012'],
  ]),
];
const films = list(
  'capacitor',
  'film, 5 mm pitch',
  [
    '1n',
    '1n5',
    '2n2',
    '3n3',
    '4n7',
    '6n8',
    '10n',
    '15n',
    '22n',
    '33n',
    '47n',
    '68n',
    '100n',
    '150n',
    '220n',
    '330n',
    '470n',
    '680n',
    '1u',
  ].map(
    (code, index) =>
      [`${code} film`, `${code} polyester 63V 5%`, index % 5 === 3 ? 0 : 24 + ((index * 29) % 70), '0.085'] as const,
  ),
);
const polypropylenes = list('capacitor', 'polypropylene, tight, for timing', [
  ['1n PP', '1n polypropylene 63V 2.5%', 22, '0.21'],
  ['4n7 PP', '4n7 polypropylene 63V 2.5%', 16, '0.24'],
  ['10n PP', '10n polypropylene 63V 2.5%', 0, '0.28'],
]);
const electrolytics = list(
  'capacitor',
  'aluminium electrolytic, radial',
  [
    '1u 50 V',
    '2u2 50 V',
    '4u7 50 V',
    '10u 25 V',
    '10u 50 V',
    '22u 25 V',
    '22u 50 V',
    '47u 25 V',
    '100u 25 V',
    '220u 25 V',
    '470u 25 V',
    '1000u 25 V',
    '2200u 25 V',
  ].map(
    (code, index) =>
      [
        `${code} el.`,
        `${code} electrolytic 20%`,
        index % 6 === 4 ? 0 : 20 + ((index * 41) % 80),
        '0.06',
        index === 3 ? 60 : undefined,
      ] as const,
  ),
);
const tantalums = list('capacitor', 'solid tantalum: work at half its voltage', [
  ['1u 35 V tant', '1u 35V tantalum', 18, '0.22'],
  ['10u 25 V tant', '10u 25V tantalum', 9, '0.31'],
]);

const diodes = list('diode', 'axial', [
  ['1N4148', '1N4148', 412, '0.012', 150],
  ['1N4007', '1N4007', 96, '0.02'],
  ['1N4001', '1N4001', 60, '0.02'],
  ['1N5817', '1N5817', 74, '0.06', 40],
  ['1N5819', '1N5819', 31, '0.07'],
  ['BAT41', 'BAT41', 0, '0.14'],
  ['BAT42', 'BAT42', 51, '0.13'],
  ['BAT85', 'BAT85', 12, '0.12'],
  ['1N34A', '1N34A', 4, '0.55'],
  ['1N4733A', '1N4733A', 18, '0.05'],
  ['1N4740A', '1N4740A', 11, '0.05'],
  ['1N4742A', '1N4742A', 14, '0.05'],
  ['1N4735A', '1N4735A', 0, '0.05'],
  ['BZX55C5V1', 'BZX55C5V1', 22, '0.04'],
]);
const leds = list('led', '3 mm', [
  ['LED red 3 mm', 'LED red 3mm', 120, '0.05', 40],
  ['LED green 3 mm', 'LED green 3mm', 66, '0.05'],
  ['LED yellow 3 mm', 'LED yellow 3mm', 40, '0.05'],
  ['LED white 3 mm', 'LED white 3mm', 12, '0.09'],
  ['LED two-colour 3 mm', 'LED red green 3mm', 25, '0.16'],
]);
const transistors = list('transistor', 'TO-92', [
  ['BC547B', 'BC547B', 84, '0.035', 40],
  ['BC547C', 'BC547C', 40, '0.035'],
  ['BC557B', 'BC557B', 72, '0.035', 40],
  ['BC337-40', 'BC337-40', 20, '0.05'],
  ['BC327-40', 'BC327-40', 15, '0.05'],
  ['BC549C', 'BC549C', 6, '0.04'],
  ['BC559C', 'BC559C', 0, '0.04'],
  ['2N3904', '2N3904', 0, '0.03', 40],
  ['2N3906', '2N3906', 46, '0.03'],
  ['2N2222A', '2N2222A', 10, '0.12'],
  ['PN2222A', 'PN2222A', 24, '0.04'],
  ['2N7000', '2N7000', 30, '0.08'],
  ['J112', 'J112', 22, '0.19'],
  ['J113', 'J113', 8, '0.19'],
  ['J201', 'J201', 3, '0.9'],
  ['2N5457', '2N5457', 5, '0.8'],
  ['BF245A', 'BF245A', 2, '1.1'],
  ['TIP31C', 'TIP31C', 4, '0.4'],
  ['BD139', 'BD139', 6, '0.25'],
  ['BD140', 'BD140', 6, '0.25'],
]);
const opAmps = list('ic', 'op-amp', [
  ['TL071CP', 'TL071CP', 12, '0.3'],
  ['TL072CP', 'TL072CP', 37, '0.28', 20],
  ['TL074CN', 'TL074CN', 21, '0.42', 12],
  ['TL082CP', 'TL082CP', 9, '0.3'],
  ['TL084CN', 'TL084CN', 4, '0.45'],
  ['TL062CP', 'TL062CP', 5, '0.34'],
  ['LM358P', 'LM358P', 14, '0.16'],
  ['LM324N', 'LM324N', 10, '0.2'],
  ['NE5532P', 'NE5532P', 16, '0.36'],
  ['NE5534P', 'NE5534P', 4, '0.5'],
  ['OPA2134PA', 'OPA2134PA', 3, '2.6'],
  ['OP07CP', 'OP07CP', 2, '0.6'],
  ['LM4562NA', 'LM4562NA', 0, '2.3'],
  ['MCP6002-I/P', 'MCP6002-I/P', 8, '0.4'],
  ['MCP6004-I/P', 'MCP6004-I/P', 3, '0.55'],
  ['TLC272CP', 'TLC272CP', 2, '0.8'],
  ['TLC072CP', 'TLC072CP', 2, '1.9'],
  ['NJM4558D', 'NJM4558D', 11, '0.22'],
  ['NJM4580D', 'NJM4580D', 6, '0.4'],
  ['LM741CN', 'LM741CN', 7, '0.3'],
  ['LF353N', 'LF353N', 4, '0.6'],
  ['RC4136N', 'RC4136N', 0, '1.2'],
]);
const logic = list('ic', 'CMOS logic', [
  ['CD4001BE', 'CD4001BE', 12, '0.26'],
  ['CD4011BE', 'CD4011BE', 24, '0.24'],
  ['CD4013BE', 'CD4013BE', 18, '0.3', 8],
  ['CD4015BE', 'CD4015BE', 4, '0.4'],
  ['CD4016BE', 'CD4016BE', 3, '0.35'],
  ['CD4017BE', 'CD4017BE', 14, '0.33'],
  ['CD4020BE', 'CD4020BE', 3, '0.45'],
  ['CD4024BE', 'CD4024BE', 9, '0.36'],
  ['CD4027BE', 'CD4027BE', 5, '0.4'],
  ['CD4030BE', 'CD4030BE', 2, '0.3'],
  ['CD4040BE', 'CD4040BE', 11, '0.38'],
  ['CD4046BE', 'CD4046BE', 6, '0.5'],
  ['CD4049UBE', 'CD4049UBE', 7, '0.34'],
  ['CD4050BE', 'CD4050BE', 4, '0.34'],
  ['CD4051BE', 'CD4051BE', 8, '0.36'],
  ['CD4052BE', 'CD4052BE', 4, '0.38'],
  ['CD4053BE', 'CD4053BE', 5, '0.38'],
  ['CD4060BE', 'CD4060BE', 4, '0.44'],
  ['CD4066BE', 'CD4066BE', 15, '0.3'],
  ['CD4069UBE', 'CD4069UBE', 10, '0.26'],
  ['CD4070BE', 'CD4070BE', 12, '0.26'],
  ['CD4071BE', 'CD4071BE', 6, '0.26'],
  ['CD4077BE', 'CD4077BE', 3, '0.3'],
  ['CD4081BE', 'CD4081BE', 9, '0.26'],
  ['CD4093BE', 'CD4093BE', 2, '0.29', 10],
  ['HEF4093BP', 'HEF4093BP', 6, '0.33'],
  ['CD40106BE', 'CD40106BE', 13, '0.31', 8],
  ['CD4520BE', 'CD4520BE', 3, '0.5'],
  ['CD4538BE', 'CD4538BE', 2, '0.6'],
  ['74HC00N', '74HC00N', 5, '0.3'],
  ['74HC14N', '74HC14N', 8, '0.32'],
  ['74HC04N', '74HC04N', 3, '0.3'],
  ['74HC4051N', '74HC4051N', 3, '0.45'],
  ['74HC132N', '74HC132N', 4, '0.4'],
]);
const otherChips = list('ic', 'sound and timing', [
  ['LM13700N', 'LM13700N', 9, '1.15', 6],
  ['NE555P', 'NE555P', 22, '0.22'],
  ['TLC555CP', 'TLC555CP', 6, '0.5'],
  ['LM393P', 'LM393P', 7, '0.18'],
  ['LM311P', 'LM311P', 4, '0.25'],
  ['LM339N', 'LM339N', 3, '0.22'],
  ['PT2399', 'PT2399', 5, '0.6'],
  ['AS3340', 'AS3340', 2, '5.9'],
  ['AS3320', 'AS3320', 0, '5.5'],
  ['LM4040CIZ-10', 'LM4040CIZ-10', 4, '0.9'],
  ['TL431CLP', 'TL431CLP', 11, '0.16'],
  ['DG413', 'DG413', 1, '3.1'],
]);
const regulators = list('regulator', 'through-hole', [
  ['LM7812CT', 'LM7812CT', 6, '0.4'],
  ['LM7912CT', 'LM7912CT', 5, '0.45'],
  ['LM7805CT', 'LM7805CT', 9, '0.38'],
  ['78L05', '78L05', 14, '0.18'],
  ['78L12', '78L12', 6, '0.18'],
  ['79L05', '79L05', 4, '0.22'],
  ['79L12', '79L12', 3, '0.22'],
  ['LM317T', 'LM317T', 8, '0.42'],
  ['LM337T', 'LM337T', 4, '0.6'],
  ['LM1117T-3.3', 'LM1117T-3.3', 3, '0.5'],
]);
const pots = list('potentiometer', '9 mm, vertical', [
  ['A10k pot', 'A10k log', 9, '0.62'],
  ['A50k pot', 'A50k log', 6, '0.62'],
  ['A100k pot', 'A100k log', 14, '0.62', 10],
  ['A500k pot', 'A500k log', 3, '0.62'],
  ['A1M pot', 'A1M log', 5, '0.62'],
  ['B1k pot', 'B1k lin', 4, '0.62'],
  ['B10k pot', 'B10k lin', 20, '0.62', 10],
  ['B25k pot', 'B25k lin', 3, '0.62'],
  ['B50k pot', 'B50k lin', 12, '0.62'],
  ['B100k pot', 'B100k lin', 31, '0.62', 15],
  ['B250k pot', 'B250k lin', 2, '0.62'],
  ['B500k pot', 'B500k lin', 6, '0.62'],
  ['B1M pot', 'B1M lin', 7, '0.62'],
  ['C100k pot', 'C100k', 2, '0.7'],
]);
const trimmers = list('trimmer', 'multi-turn, top adjust', [
  ['T 1k', '1k', 6, '0.44'],
  ['T 2k', '2k', 4, '0.44'],
  ['T 10k', '10k', 17, '0.44'],
  ['T 20k', '20k', 3, '0.44'],
  ['T 50k', '50k', 6, '0.44'],
  ['T 100k', '100k', 12, '0.44'],
  ['T 500k', '500k', 2, '0.44'],
]);
const connectors = list('connector', '', [
  ['jack mono switched', 'Jack 3.5 mm mono switched', 140, '0.36', 60],
  ['jack stereo', 'Jack 3.5 mm stereo', 24, '0.4'],
  ['power header 2×5', 'Box header 2x5 2.54 mm', 40, '0.18', 20],
  ['power header 2×8', 'Box header 2x8 2.54 mm', 12, '0.24'],
  ['pin strip 1×40', 'Pin strip 1x40 2.54 mm', 25, '0.2'],
  ['socket strip 1×40', 'Socket strip 1x40 2.54 mm', 18, '0.45'],
  ['DIP-8 socket', 'IC socket DIP-8', 90, '0.06', 40],
  ['DIP-14 socket', 'IC socket DIP-14', 80, '0.08', 40],
  ['DIP-16 socket', 'IC socket DIP-16', 55, '0.09', 30],
  ['terminal 3 way', 'Screw terminal 3 way 5.08 mm', 8, '0.42'],
  ['mains inlet C14', 'Mains inlet IEC C14 with fuse holder', 3, '3.4'],
]);
const switches = list('switch', '', [
  ['SPDT on-on', 'Toggle switch SPDT on-on', 22, '0.74', 10],
  ['SPDT on-off-on', 'Toggle switch SPDT on-off-on', 14, '0.82'],
  ['DPDT on-on', 'Toggle switch DPDT on-on', 9, '0.95'],
  ['button momentary', 'Push button momentary 6 mm', 30, '0.22'],
  ['rotary 1×12', 'Rotary switch 1 pole 12 way', 4, '2.1'],
  ['rotary 2×6', 'Rotary switch 2 pole 6 way', 6, '2.1'],
  ['encoder', 'Rotary encoder with push', 5, '0.9'],
]);
const hardware = list('hardware', '', [
  ['knob 13 mm', 'Knob 13 mm black', 60, '0.5', 30],
  ['knob 20 mm', 'Knob 20 mm black', 14, '0.8'],
  ['M3×6 screw', 'Screw M3x6', 300, '0.02', 100],
  ['M3 nut', 'Nut M3', 260, '0.01'],
  ['M3×10 spacer', 'Spacer M3x10', 80, '0.09', 40],
  ['heat sink TO-220', 'Heat sink TO-220', 6, '0.6'],
  ['panel 6 units', 'Panel blank 6 units', 7, '4.2'],
  ['panel 12 units', 'Panel blank 12 units', 3, '6.5'],
  ['cable tie', 'Cable tie 100 mm', 120, '0.02'],
]);
const safetyParts: DemoPart[] = [
  ...list('fuse', 'IEC 60127; never another value or type', [
    ['fuse T 500 mA', 'Fuse 500 mA slow 5x20', 20, '0.25'],
    ['fuse T 1 A', 'Fuse 1 A slow 5x20', 10, '0.25'],
  ]),
  ...list('transformer', 'mains transformer, safety isolating', [
    ['2×15 V 15 VA', 'Mains transformer 2x15V 15VA', 2, '11.8'],
  ]),
  ...list('capacitor', 'X2 safety capacitor, IEC 60384-14', [['100n X2', '100n X2 275V polypropylene', 5, '0.6']]),
];
const others = list('inductor', '', [
  ['10 µH', '10uH axial', 20, '0.12'],
  ['100 µH', '100uH axial', 9, '0.14'],
  ['ferrite bead', '600Ω ferrite bead', 60, '0.04'],
]);
const crystals = list('crystal', '', [
  ['16 MHz', '16 MHz crystal', 5, '0.3'],
  ['8 MHz', '8 MHz crystal', 3, '0.3'],
  ['32.768 kHz', '32.768kHz crystal', 6, '0.24'],
]);
const couplers = list('optocoupler', '', [
  ['PC817', 'PC817', 12, '0.14'],
  ['6N138', '6N138', 4, '0.6'],
  ['4N35', '4N35', 3, '0.3'],
]);
const thermistors = list('thermistor', '', [
  ['1k PTC 3300 ppm', '1k PTC', 6, '1.4'],
  ['10k NTC', '10k NTC', 9, '0.3'],
]);
const boards = list('pcb', '', [
  ['slope pair board', 'Slope pair main board', 8, '3.2'],
  ['clock divider board', 'Clock divider board', 5, '2.6'],
  ['state-variable board', 'State-variable filter board', 4, '3.6'],
  ['wave folder board', 'Wave folder board', 6, '2.9'],
  ['supply board', 'Supply board', 2, '4.4'],
]);

export const demoParts: readonly DemoPart[] = [
  ...resistors,
  ...extraResistors,
  ...ceramics,
  ...films,
  ...polypropylenes,
  ...electrolytics,
  ...tantalums,
  ...diodes,
  ...leds,
  ...transistors,
  ...opAmps,
  ...logic,
  ...otherChips,
  ...regulators,
  ...pots,
  ...trimmers,
  ...connectors,
  ...switches,
  ...hardware,
  ...safetyParts,
  ...others,
  ...crystals,
  ...couplers,
  ...thermistors,
  ...boards,
];
