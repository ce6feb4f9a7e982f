/**
 * Figures against ngspice (Debian package): each formula simulated as a circuit of ideal parts, with a behavioural
 * Schmitt gate of two hysteresis switches. Agreement within 1 %, as the formulas assume no delay and no loading.
 */
import { describe, expect, it } from 'vitest';
import { computeFigure } from '@/lib/electronics/effects/compute-figure';
import { THRESHOLDS_40106, THRESHOLDS_4093 } from '@/lib/electronics/families/logic-4000';
import { measured, simulate } from './ngspice';

const WITHIN = 0.01;

function expectWithin(ours: number, theirs: number): void {
  expect(Math.abs(ours / theirs - 1), `${ours} here, ${theirs} in ngspice`).toBeLessThan(WITHIN);
}

/** −3 dB (half power) of a network from `in` to `out`, found on a fine logarithmic sweep. */
function cornerOf(network: string, around: number, edge: 'fall' | 'rise'): number {
  const results = simulate(`* corner
V1 in 0 AC 1
${network}
.control
ac dec 2000 ${around / 10} ${around * 10}
meas ac corner when vdb(out)=-3.0102999566 ${edge}=1
.endc
.end
`);
  return measured(results, 'corner');
}

const RC_POINTS = [
  [6800, 1e-9],
  [10_000, 1e-9],
  [1000, 6.8e-9],
  [1e6, 100e-12],
  [47, 10e-6],
] as const;

describe('RC corners', () => {
  it.each(RC_POINTS)('low-pass of %d Ω and %d F', (r, c) => {
    const { value } = computeFigure('rc-low-pass', { r, c });
    expectWithin(value, cornerOf(`R1 in out ${r}\nC1 out 0 ${c}`, value, 'fall'));
  });

  it.each(RC_POINTS)('high-pass of %d Ω and %d F', (r, c) => {
    const { value } = computeFigure('rc-high-pass', { r, c });
    expectWithin(value, cornerOf(`C1 in out ${c}\nR1 out 0 ${r}`, value, 'rise'));
  });
});

/** A lightly driven tank peaks where it resonates. */
function peakOf(network: string, around: number): number {
  const results = simulate(`* tank
I1 0 out AC 1
Rq out 0 1Meg
${network}
.control
ac lin 40001 ${around * 0.8} ${around * 1.2}
meas ac peak max_at vdb(out)
.endc
.end
`);
  return measured(results, 'peak');
}

describe('resonance', () => {
  it.each([
    [1e-3, 100e-12],
    [100e-6, 1e-9],
    [10e-6, 220e-12],
  ])('LC of %d H and %d F', (l, c) => {
    const { value } = computeFigure('lc-resonance', { l, c });
    expectWithin(value, peakOf(`L1 out 0 ${l}\nC1 out 0 ${c}`, value));
  });

  it.each([
    [100e-6, 1e-9, 1e-9],
    [330e-6, 1e-9, 2.2e-9],
  ])('Colpitts tank of %d H with %d F and %d F', (l, c1, c2) => {
    const { value } = computeFigure('colpitts', { l, c1, c2 });
    expectWithin(value, peakOf(`L1 out 0 ${l}\nC1 out mid ${c1}\nC2 mid 0 ${c2}\nRb mid 0 1G`, value));
  });
});

/** One-gate RC oscillator: the output is at either rail through 1 Ω, the thresholds are the switches' hysteresis. */
function schmittFrequency(vdd: number, up: number, down: number, r: number, c: number, expected: number): number {
  const period = 1 / expected;
  const results = simulate(`* one-gate oscillator
Vdd vdd 0 ${vdd}
R1 y cap ${r}
C1 cap 0 ${c} IC=0
S1 y 0 cap 0 pulls
S2 vdd y 0 cap lifts
.model pulls sw vt=${(up + down) / 2} vh=${(up - down) / 2} ron=1 roff=1T
.model lifts sw vt=${-(up + down) / 2} vh=${(up - down) / 2} ron=1 roff=1T
.tran ${period / 5000} ${period * 8} 0 ${period / 5000} uic
.meas tran one when v(y)=${vdd / 2} rise=3
.meas tran two when v(y)=${vdd / 2} rise=6
.end
`);
  return 3 / (measured(results, 'two') - measured(results, 'one'));
}

describe('RC oscillator with a Schmitt gate', () => {
  it.each(
    [...THRESHOLDS_4093, ...THRESHOLDS_40106].map(
      (row) => [row.maker, row.supplyVolts, row.upVolts, row.downVolts] as const,
    ),
  )('%s at %d V switching at %d V and %d V, 100 kΩ and 10 nF', (_, vdd, up, down) => {
    const parts = { r: 100_000, c: 10e-9 };
    const { value } = computeFigure('schmitt-rc', { vdd, 'vt-up': up, 'vt-down': down, ...parts });
    expectWithin(value, schmittFrequency(vdd, up, down, parts.r, parts.c, value));
  });

  it('22 kΩ and 100 pF at 5 V: 559.6 kHz', () => {
    const { value } = computeFigure('schmitt-rc', { vdd: 5, 'vt-up': 2.9, 'vt-down': 1.9, r: 22_000, c: 100e-12 });
    expectWithin(value, 559_563);
    expectWithin(value, schmittFrequency(5, 2.9, 1.9, 22_000, 100e-12, value));
  });
});

describe('555 astable', () => {
  it.each([
    [1000, 10_000, 100e-9],
    [10_000, 47_000, 10e-9],
  ])('%d Ω, %d Ω, %d F', (ra, rb, c) => {
    const { value } = computeFigure('555-astable', { ra, rb, c });
    const period = 1 / value;
    const results = simulate(`* 555: the discharge switch works between a third and two thirds of the supply
Vcc vcc 0 9
Ra vcc dis ${ra}
Rb dis cap ${rb}
C1 cap 0 ${c} IC=3.5
S1 dis 0 cap 0 discharge
.model discharge sw vt=4.5 vh=1.5 ron=0.1 roff=1T
.tran ${period / 5000} ${period * 8} 0 ${period / 5000} uic
.meas tran one when v(cap)=4.5 rise=2
.meas tran two when v(cap)=4.5 rise=5
.end
`);
    expectWithin(value, 3 / (measured(results, 'two') - measured(results, 'one')));
  });
});

function operatingPoint(network: string): number {
  return measured(
    simulate(`* operating point
${network}
.control
op
let level = v(out)
print level
.endc
.end
`),
    'level',
  );
}

describe('gains and dividers', () => {
  it.each([
    [10_000, 47_000],
    [100_000, 22_000],
  ])('inverting gain of %d Ω in and %d Ω back', (rin, rf) => {
    expectWithin(
      computeFigure('inverting-gain', { rin, rf }).value,
      operatingPoint(`V1 in 0 1\nR1 in inv ${rin}\nR2 inv out ${rf}\nE1 out 0 0 inv 1e7`),
    );
  });

  it.each([
    [10_000, 47_000],
    [1000, 1000],
  ])('non-inverting gain of %d Ω to ground and %d Ω back', (rg, rf) => {
    expectWithin(
      computeFigure('non-inverting-gain', { rg, rf }).value,
      operatingPoint(`V1 in 0 1\nR1 inv 0 ${rg}\nR2 inv out ${rf}\nE1 out 0 in inv 1e7`),
    );
  });

  it('a divider, free and loaded', () => {
    const divider = { vin: 12, r1: 33_000, r2: 10_000 };
    expectWithin(computeFigure('divider', divider).value, operatingPoint('V1 in 0 12\nR1 in out 33k\nR2 out 0 10k'));
    expectWithin(
      computeFigure('divider', { ...divider, rl: 100_000 }).value,
      operatingPoint('V1 in 0 12\nR1 in out 33k\nR2 out 0 10k\nR3 out 0 100k'),
    );
  });
});

describe('time', () => {
  it('a time constant is the time to 63.2 %', () => {
    const { value } = computeFigure('time-constant', { r: 10_000, c: 100e-9 });
    const results = simulate(`* charge
V1 in 0 PULSE(0 1 0 1n 1n 1 2)
R1 in out 10k
C1 out 0 100n
.tran 1u 5m 0 1u
.meas tran tau when v(out)=${1 - Math.exp(-1)} rise=1
.end
`);
    expectWithin(value, measured(results, 'tau'));
  });
});

describe('state-variable filter', () => {
  it.each([
    [10_000, 1e-9, 10_000, 1e-9],
    [22_000, 1e-9, 10_000, 2.2e-9],
  ])('centre with %d Ω, %d F and %d Ω, %d F', (r1, c1, r2, c2) => {
    const { value } = computeFigure('state-variable-centre', { r1, c1, r2, c2 });
    // The summer: high = −in − low + band; band and low are inverting integrators of ideal amplifiers.
    const results = simulate(`* state variable
V1 in 0 AC 1
B1 high 0 V = -v(in) - v(low) + 0.2*v(band)
R1 high n1 ${r1}
C1 n1 band ${c1}
E1 band 0 0 n1 1e6
R2 band n2 ${r2}
C2 n2 low ${c2}
E2 low 0 0 n2 1e6
.control
ac lin 20001 ${value * 0.8} ${value * 1.2}
meas ac peak max_at vdb(band)
.endc
.end
`);
    expectWithin(value, measured(results, 'peak'));
  });
});

describe('exponential converter', () => {
  it('a volt-per-octave scale doubles the collector current', () => {
    const parts = { rin: 54_900, rb: 1000, temperature: 25 };
    const { value } = computeFigure('volt-per-octave', parts);
    const current = (volts: number): number =>
      measured(
        simulate(`* ideal transistor fed from the divider by a buffer; its base current does not load it
V1 in 0 ${volts}
R1 in div ${parts.rin}
R2 div 0 ${parts.rb}
E1 base 0 div 0 1
V2 vc 0 5
Q1 vc base e expo
V3 e 0 -0.55
.model expo npn(is=1e-14 bf=1e6)
.options temp=25 tnom=25
.control
op
let level = -i(V2)
print level
.endc
.end
`),
        'level',
      );
    expectWithin(2, current(value) / current(0));
  });
});
