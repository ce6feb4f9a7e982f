/** Oscillators, filters, envelopes, delay lines, multipliers, arrays and references: parts replaced by their own number only. */
import { pinOut, practice, recalled, supplyOf } from './fact';
import type { ExactIcFamily, Fact } from './family';

const K = 'KiCad 6 symbol, read';
const NONE = supplyOf('- - -', '');

function row(group: ExactIcFamily['group'], id: string, title: string, unitFunction: string, pins: string | null, supply = NONE, units = 1, near: Readonly<Record<string, Fact<string>>> = {}): ExactIcFamily {
  return {
    id,
    kind: 'ic',
    group,
    title,
    units,
    unitFunction,
    pinOut: pins === null ? null : practice(pinOut(pins, `DIP-${pins.split(' ').length}`), K),
    supply,
    output: null,
    near,
    cautions: [],
  };
}

const SYNTH_SUPPLY = supplyOf('9m 24m 24m', '');
const BUCKET_PINS = 'GND CP1 IN VGG VDD CP2 OUT1 OUT2';
const SHORTER = practice('Stage count and clock differ, so delay times change.', 'Panasonic MN3200 series sheets');

export const SOUND_FAMILIES: readonly ExactIcFamily[] = [
  row('sound', 'as3340', 'voltage-controlled oscillator', '3340 VCO', 'SCALE1 SCALE2 VEE VP VPWM VHSI VHFT VSO VSSI VTO CAP GND VLFI VS VFCI VCC', SYNTH_SUPPLY),
  row('sound', 'as3345', 'voltage-controlled oscillator', '3345 VCO', 'SCALE1 SCALE2 VEE VP VPWM VHSI VMO VHFT VSO VSSI VTO CAP GND GND VLFI VS VFCI VCC', SYNTH_SUPPLY),
  row('sound', 'as3320', 'voltage-controlled filter', '3320 VCF', 'IN1 IN2 GND CAP2 CAP1 OUT2 OUT1 VRES IRES OUT4 CAP4 VCFI VEE VCC OUT3 CAP3 IN3 IN4', SYNTH_SUPPLY, 4),
  row('sound', 'as3310', 'envelope generator', '3310 envelope', 'CAP ENVOUT VP GATE TRIG VEE PGND CCOMP VCS IIN VCC VCD VCR GND VCA ATKOUT', SYNTH_SUPPLY),
  row('sound', 'as3330', 'dual voltage-controlled amplifier', '3330 VCA', 'OUT1 VG1 DTRIM1 IN1 VEE VCE1 VCL1 IDLE CCOMP1 VCC CCOMP2 VCL2 IN2 VCE2 VG2 OUT2 DTRIM2 GND', SYNTH_SUPPLY, 2),
  row('sound', 'as3360', 'dual voltage-controlled amplifier', '3360 VCA', 'GND IO1 VE1 VO1 VC1 II1 VEE VREF II2 VC2 VO2 VE2 IO2 VCC', SYNTH_SUPPLY, 2),
  row('sound', 'cem3372', 'filter with VCAs', '3372', null),
  row('sound', 'ssi2164', 'quad voltage-controlled amplifier', '2164 VCA', 'MODE IIN1 VC1 IOUT1 IOUT2 VC2 IIN2 GND V- IIN3 VC3 IOUT3 IOUT4 VC4 IIN4 V+', supplyOf('8m 36m 36m', ''), 4),
  row('sound', 'ssi2144', 'four-pole filter', '2044 VCF', 'SIG+ SIG- OUT C4A C4B C3A C3B V- GND C2B C2A C1B C1A Q FREQ V+', supplyOf('8m 36m 36m', '')),
  row('sound', 'ssi2130', 'voltage-controlled oscillator', '2130 VCO', null),
  row('sound', 'ssi2131', 'voltage-controlled oscillator', '2131 VCO', null),
  row('sound', 'ssi2190', 'ratiometric controller', '2190', null),
  row('sound', 'mn3005', 'bucket-brigade delay, 4096 stages', 'delay line 4096, PMOS', 'GND CP2 OUT1 OUT2 VDD CP1 IN VGG', supplyOf('14m 16m 18m', '')),
  row('sound', 'mn3007', 'bucket-brigade delay, 1024 stages', 'delay line 1024, PMOS', BUCKET_PINS, supplyOf('14m 16m 18m', '')),
  row('sound', 'mn3207', 'bucket-brigade delay, 1024 stages, low voltage', 'delay line 1024, NMOS', BUCKET_PINS, supplyOf('4m 10m 11m', ''), 1, { mn3208: SHORTER }),
  row('sound', 'mn3208', 'bucket-brigade delay, 2048 stages, low voltage', 'delay line 2048, NMOS', null, supplyOf('4m 10m 11m', ''), 1, { mn3207: SHORTER }),
  row('sound', 'mn3205', 'bucket-brigade delay, 4096 stages, low voltage', 'delay line 4096, NMOS', null, supplyOf('4m 10m 11m', '')),
  row('sound', 'mn3204', 'bucket-brigade delay, 512 stages, low voltage', 'delay line 512, NMOS', null, supplyOf('4m 10m 11m', '')),
  row('sound', 'mn3101', 'two-phase clock for delay lines', 'delay clock, PMOS lines', 'GND CP1 VDD CP2 OX3 OX2 OX1 VGG', supplyOf('8m 16m 18m', '')),
  row('sound', 'mn3102', 'two-phase clock for delay lines, low voltage', 'delay clock, NMOS lines', 'GND CP1 VDD CP2 OX3 OX2 OX1 VGG', supplyOf('4m 10m 11m', '')),
  row('sound', 'sad1024', 'dual bucket-brigade delay, 512 stages', 'delay line 512, NMOS pair', 'GND IN1 CLK2A NC OUT1 OUT1X VDD CLK1A VBB CLK1B OUT2X OUT2 NC CLK2B IN2 NC', NONE, 2),
  row('sound', 'tda1022', 'bucket-brigade delay, 512 stages', 'delay line 512, PMOS', 'CL1 NC NC CL2 IN NC NC OUT513 VDD NC NC OUT512 V13 NC NC GND'),
  row('sound', 'pt2399', 'digital echo', 'echo 2399', 'VCC REF AGND DGND CLKO VCO CC1 CC0 OP1OUT OP1IN OP2IN OP2OUT LPF2IN LPF2OUT LPF1OUT LPF1IN', supplyOf('4.5m 5.5m 6m', '')),
  row('sound', 'that2180', 'voltage-controlled amplifier, trimmed', '218x VCA', 'IN E+ E- SYM V- GND V+ OUT', supplyOf('8m 36m 36m', ''), 1, { that2181: practice('The 2181 wants its symmetry trimmed; the 2180 is trimmed by the maker.', 'THAT 2180/2181 sheet') }),
  row('sound', 'that2181', 'voltage-controlled amplifier, trimmable', '218x VCA', 'IN E+ E- SYM V- GND V+ OUT', supplyOf('8m 36m 36m', ''), 1, { that2180: practice('The 2180 is trimmed by the maker; leave the symmetry pin as its sheet says.', 'THAT 2180/2181 sheet') }),
  row('sound', 'ssm2018', 'voltage-controlled amplifier', '2018 VCA', '+I1-G V+ -IG -I1-G COMP1 IN+ IN- COMP2 COMP3 V- VC MODE GND VG BAL V1-G', supplyOf('10m 36m 36m', '')),
  row('sound', 'xr2206', 'function generator', '2206 generator', null, supplyOf('10m 26m 26m', '')),
  row('sound', 'icl8038', 'function generator', '8038 generator', null, supplyOf('10m 30m 36m', '')),
  row('sound', 'ad633', 'multiplier', '633 multiplier', null, supplyOf('16m 36m 36m', '')),
  row('sound', 'mc1496', 'balanced modulator', '1496 modulator', null),
  row('sound', 'ne570', 'compandor', '570 compandor', null, supplyOf('6m 24m 24m', ''), 2, { ne571: recalled('The NE571 is the looser grade: lower supply and more distortion.') }),
  row('sound', 'ne571', 'compandor', '570 compandor', null, supplyOf('6m 18m 18m', ''), 2, { ne570: recalled('The NE570 is the tighter grade.') }),
  row('sound', 'lf398', 'sample and hold', '398 sample and hold', 'V+ ADJ IN V- OUT CH REF LOGIC', supplyOf('10m 36m 36m', '')),
  row('sound', 'lm3914', 'bar display driver, linear', 'bar driver, linear', null, supplyOf('3m 25m 25m', ''), 1, {}),
  row('sound', 'lm3915', 'bar display driver, 3 dB steps', 'bar driver, logarithmic', null, supplyOf('3m 25m 25m', '')),
  row('sound', 'lm3916', 'bar display driver, VU', 'bar driver, VU', null, supplyOf('3m 25m 25m', '')),
  row('sound', 'ym2149', 'sound generator', '2149 generator', null, supplyOf('4.75m 5.25m 7m', '')),
  row('sound', 'ad654', 'voltage to frequency converter', '654 converter', 'FOUT COM RT VIN V- CT1 CT2 V+', supplyOf('4.5m 36m 36m', '')),
  row('sound', 'lm331', 'voltage to frequency converter', '331 converter', null, supplyOf('4m 40m 40m', '')),
  row('sound', 'ba6110', 'voltage-controlled amplifier', '6110 VCA', null),
  row('sound', 'ba662', 'voltage-controlled amplifier', '662 VCA', null),
  row('array', 'ca3046', 'five NPN, two of them a pair', '3046 array', null, NONE, 5, { ca3086: recalled('The CA3086 is the ungraded CA3046: matching is not promised.') }),
  row('array', 'ca3086', 'five NPN, general purpose', '3046 array', null, NONE, 5, { ca3046: recalled('The CA3046 is graded for matching.') }),
  row('array', 'that300', 'four matched NPN', '300 array', null, NONE, 4),
  row('array', 'that320', 'four matched PNP', '320 array', null, NONE, 4),
  row('array', 'that340', 'two matched NPN and two PNP', '340 array', null, NONE, 4),
  row('array', 'uln2003', 'seven Darlington drivers', 'Darlington driver', 'I1 I2 I3 I4 I5 I6 I7 GND COM O7 O6 O5 O4 O3 O2 O1', NONE, 7),
  row('array', 'uln2803', 'eight Darlington drivers', 'Darlington driver', 'I1 I2 I3 I4 I5 I6 I7 I8 GND COM O8 O7 O6 O5 O4 O3 O2 O1', NONE, 8),
  {
    ...row('reference', 'tl431', 'adjustable shunt reference, 2.495 V', 'shunt reference 2.495 V', null, supplyOf('2.5m 36p 37m', 'TL431 sheets')),
    pinOut: practice(pinOut('REF A K', 'TO-92'), K),
  },
  row('reference', 'lm399', 'heated 6.95 V reference', 'heated reference', null),
  row('reference', 'ref01', '10 V reference', 'series reference 10 V', 'NC VIN TEMP GND TRIM OUT NC NC'),
  row('reference', 'ref02', '5 V reference', 'series reference 5 V', 'NC VIN TEMP GND TRIM OUT NC NC'),
  row('reference', 'ref03', '2.5 V reference', 'series reference 2.5 V', 'NC VIN TEMP GND TRIM OUT NC NC'),
  row('reference', 'ref102', '10 V precision reference', 'series reference 10 V, 102', null),
];
