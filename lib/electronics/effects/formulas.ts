/**
 * The figures that a circuit's parts set, each a textbook formula with its inputs in base units (ohm, farad, henry,
 * volt, degree Celsius). Reference tests compare them with ngspice.
 */

export const FORMULA_IDS = [
  'rc-low-pass',
  'rc-high-pass',
  'lc-resonance',
  'colpitts',
  'schmitt-rc',
  '555-astable',
  'inverting-gain',
  'non-inverting-gain',
  'divider',
  'time-constant',
  'state-variable-centre',
  'volt-per-octave',
] as const;
export type FormulaId = (typeof FORMULA_IDS)[number];

export type InputUnit = 'ohm' | 'farad' | 'henry' | 'volt' | 'celsius';
export type FigureKind = 'frequency' | 'gain' | 'voltage' | 'time';

export interface FormulaInput {
  readonly name: string;
  readonly unit: InputUnit;
  readonly says: string;
  /** Taken where the input is not given; only inputs that a circuit may lack have one. */
  readonly fallback?: number;
}

/** Reads an input that the caller has checked to be there. */
export type Inputs = (name: string) => number;

export interface Formula {
  readonly id: FormulaId;
  readonly title: string;
  readonly kind: FigureKind;
  readonly unit: 'hertz' | 'ratio' | 'volt' | 'second' | 'volt-per-octave';
  /** The formula as a builder would write it. */
  readonly written: string;
  readonly inputs: readonly FormulaInput[];
  readonly compute: (input: Inputs) => number;
  /** A reason why the inputs contradict each other, or null. */
  readonly refuse?: (input: Inputs) => string | null;
}

const ohms = (name: string, says: string): FormulaInput => ({ name, unit: 'ohm', says });
const farads = (name: string, says: string): FormulaInput => ({ name, unit: 'farad', says });

const R = ohms('r', 'the resistor');
const C = farads('c', 'the capacitor');
const L: FormulaInput = { name: 'l', unit: 'henry', says: 'the inductor' };
const corner = (input: Inputs): number => 1 / (2 * Math.PI * input('r') * input('c'));

/** Boltzmann constant over the elementary charge, V/K; both are exact in the SI since 2019. */
const VOLTS_PER_KELVIN = 1.380649e-23 / 1.602176634e-19;

/** Stands for an open end where no load is given: far beyond any resistor, yet finite. */
const NO_LOAD_OHMS = 1e18;

export const FORMULAS: Readonly<Record<FormulaId, Formula>> = {
  'rc-low-pass': {
    id: 'rc-low-pass',
    title: 'RC low-pass corner',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (2π·R·C)',
    inputs: [R, C],
    compute: corner,
  },
  'rc-high-pass': {
    id: 'rc-high-pass',
    title: 'RC high-pass corner',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (2π·R·C)',
    inputs: [R, C],
    compute: corner,
  },
  'lc-resonance': {
    id: 'lc-resonance',
    title: 'LC resonance',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (2π·√(L·C))',
    inputs: [L, C],
    compute: (input) => 1 / (2 * Math.PI * Math.sqrt(input('l') * input('c'))),
  },
  colpitts: {
    id: 'colpitts',
    title: 'Colpitts oscillator, tank only',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (2π·√(L·C1·C2/(C1+C2)))',
    inputs: [L, farads('c1', 'the first capacitor'), farads('c2', 'the second capacitor')],
    compute: (input) =>
      1 / (2 * Math.PI * Math.sqrt((input('l') * input('c1') * input('c2')) / (input('c1') + input('c2')))),
  },
  'schmitt-rc': {
    id: 'schmitt-rc',
    title: 'RC oscillator with a Schmitt gate',
    kind: 'frequency',
    unit: 'hertz',
    written: 'T = R·C·[ln((VDD−VT−)/(VDD−VT+)) + ln(VT+/VT−)]',
    inputs: [
      { name: 'vdd', unit: 'volt', says: 'the supply' },
      { name: 'vt-up', unit: 'volt', says: 'the upper threshold' },
      { name: 'vt-down', unit: 'volt', says: 'the lower threshold' },
      R,
      C,
    ],
    compute: (input) => {
      const [supply, up, down] = [input('vdd'), input('vt-up'), input('vt-down')];
      return 1 / (input('r') * input('c') * (Math.log((supply - down) / (supply - up)) + Math.log(up / down)));
    },
    refuse: (input) => {
      if (input('vt-up') <= input('vt-down')) return 'the upper threshold must lie above the lower one';
      return input('vt-up') >= input('vdd') ? 'the upper threshold must lie below the supply' : null;
    },
  },
  '555-astable': {
    id: '555-astable',
    title: '555 astable',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (ln 2·(RA + 2·RB)·C)',
    inputs: [ohms('ra', 'the resistor to the supply'), ohms('rb', 'the resistor between discharge and threshold'), C],
    compute: (input) => 1 / (Math.LN2 * (input('ra') + 2 * input('rb')) * input('c')),
  },
  'inverting-gain': {
    id: 'inverting-gain',
    title: 'inverting gain',
    kind: 'gain',
    unit: 'ratio',
    written: 'gain = −RF / RIN',
    inputs: [ohms('rin', 'the input resistor'), ohms('rf', 'the feedback resistor')],
    compute: (input) => -input('rf') / input('rin'),
  },
  'non-inverting-gain': {
    id: 'non-inverting-gain',
    title: 'non-inverting gain',
    kind: 'gain',
    unit: 'ratio',
    written: 'gain = 1 + RF / RG',
    inputs: [ohms('rg', 'the resistor to ground'), ohms('rf', 'the feedback resistor')],
    compute: (input) => 1 + input('rf') / input('rg'),
  },
  divider: {
    id: 'divider',
    title: 'voltage divider',
    kind: 'voltage',
    unit: 'volt',
    written: 'V = VIN·R2 / (R1 + R2), R2 in parallel with the load',
    inputs: [
      { name: 'vin', unit: 'volt', says: 'the voltage divided' },
      ohms('r1', 'the upper resistor'),
      ohms('r2', 'the lower resistor'),
      { name: 'rl', unit: 'ohm', says: 'the load', fallback: NO_LOAD_OHMS },
    ],
    compute: (input) => {
      const lower = 1 / (1 / input('r2') + 1 / input('rl'));
      return (input('vin') * lower) / (input('r1') + lower);
    },
  },
  'time-constant': {
    id: 'time-constant',
    title: 'RC time constant',
    kind: 'time',
    unit: 'second',
    written: 'τ = R·C',
    inputs: [R, C],
    compute: (input) => input('r') * input('c'),
  },
  'state-variable-centre': {
    id: 'state-variable-centre',
    title: 'state-variable filter centre',
    kind: 'frequency',
    unit: 'hertz',
    written: 'f = 1 / (2π·√(R1·C1·R2·C2)), equal integrators: 1 / (2π·R·C)',
    inputs: [
      ohms('r1', 'the first integrator’s resistor'),
      farads('c1', 'the first integrator’s capacitor'),
      ohms('r2', 'the second integrator’s resistor'),
      farads('c2', 'the second integrator’s capacitor'),
    ],
    compute: (input) => 1 / (2 * Math.PI * Math.sqrt(input('r1') * input('c1') * input('r2') * input('c2'))),
  },
  'volt-per-octave': {
    id: 'volt-per-octave',
    title: 'exponential converter’s scale',
    kind: 'voltage',
    unit: 'volt-per-octave',
    written: 'V/octave = (kT/q)·ln 2·(RIN + RB) / RB',
    inputs: [
      ohms('rin', 'the input resistor'),
      ohms('rb', 'the resistor from base to ground'),
      { name: 'temperature', unit: 'celsius', says: 'the transistor pair’s temperature', fallback: 25 },
    ],
    compute: (input) =>
      VOLTS_PER_KELVIN * (input('temperature') + 273.15) * Math.LN2 * ((input('rin') + input('rb')) / input('rb')),
  },
};

export function isFormulaId(text: string): text is FormulaId {
  return FORMULA_IDS.some((id) => id === text);
}
