/**
 * Operational amplifiers. One row per family; figures are typical at 25 °C, each with the letter of its basis
 * (d datasheet read, p common practice, m memory, - not known).
 */
import { noted, pinOut, practice, recalled, supplyOf } from './fact';
import type { Fact, OpAmpFamily, PinOut } from './family';

export const SINGLE_741 = pinOut('NULL IN- IN+ V- NULL OUT V+ NC', 'DIP-8');
export const SINGLE_OP07 = pinOut('NULL IN- IN+ V- NC OUT V+ NULL', 'DIP-8');
export const SINGLE_5534 = pinOut('BAL IN- IN+ V- COMP OUT V+ BAL/COMP', 'DIP-8');
export const SINGLE_BARE = pinOut('NC IN- IN+ V- NC OUT V+ NC', 'DIP-8');
export const SINGLE_STROBE = pinOut('NULL IN- IN+ V- NULL OUT V+ STROBE', 'DIP-8');
export const DUAL_8 = pinOut('OUT1 IN1- IN1+ V- IN2+ IN2- OUT2 V+', 'DIP-8');
export const QUAD_14 = pinOut('OUT1 IN1- IN1+ V+ IN2+ IN2- OUT2 OUT3 IN3- IN3+ V- IN4+ IN4- OUT4', 'DIP-14');

const LAYOUTS: Readonly<Record<string, readonly [PinOut, number, string]>> = {
  s741: [SINGLE_741, 1, 'single'],
  sop07: [SINGLE_OP07, 1, 'single'],
  s5534: [SINGLE_5534, 1, 'single'],
  sbare: [SINGLE_BARE, 1, 'single'],
  sstrobe: [SINGLE_STROBE, 1, 'single'],
  dual: [DUAL_8, 2, 'dual'],
  quad: [QUAD_14, 4, 'quad'],
};

// Columns: id | layout | input | supply min max abs | output above V-, below V+ | input above V-, below V+ | GBW MHz | slew V/us |
// noise nV | bias nA | mA per amplifier | unity-gain stable | phase reversal | source of the datasheet figures
const TABLE = `
tl071 | s741 | JFET | 7m 36d 36d | 1.5d 1.5d | 3d 0d | 3d | 13d | 18d | 0.065m | 1.4d | yes | yes | TI 1996 and ST TL071/TL072 sheets (±12 to ±13.5 V out, inputs -12 to +15 V at ±15 V, ±18 V absolute)
tl072 | dual | JFET | 7m 36d 36d | 1.5d 1.5d | 3d 0d | 3d | 13d | 18d | 0.065m | 1.4d | yes | yes | TI 1996 and ST TL071/TL072 sheets (±12 to ±13.5 V out, inputs -12 to +15 V at ±15 V, ±18 V absolute)
tl074 | quad | JFET | 7m 36d 36d | 1.5d 1.5d | 3d 0d | 3d | 13d | 18d | 0.065m | 1.4d | yes | yes | TI 1996 and ST TL071/TL072 sheets (±12 to ±13.5 V out, inputs -12 to +15 V at ±15 V, ±18 V absolute)
tl061 | s741 | JFET | 7m 36p 36m | 1.5m 1.5m | 3m 0d | 1m | 3.5d | 42m | 0.03m | 0.2d | yes | yes | TI 1999
tl062 | dual | JFET | 7m 36p 36m | 1.5m 1.5m | 3m 0d | 1m | 3.5d | 42m | 0.03m | 0.2d | yes | yes | TI 1999
tl064 | quad | JFET | 7m 36p 36m | 1.5m 1.5m | 3m 0d | 1m | 3.5d | 42m | 0.03m | 0.2d | yes | yes | TI 1999
tl081 | s741 | JFET | 7m 36p 36m | 1.5d 1.5d | 3d 0d | 3d | 13m | 18m | 0.03d | 1.4d | yes | yes | TI 2004
tl082 | dual | JFET | 7m 36p 36m | 1.5d 1.5d | 3d 0d | 3d | 13m | 18m | 0.03d | 1.4d | yes | yes | TI 2004
tl084 | quad | JFET | 7m 36p 36m | 1.5d 1.5d | 3d 0d | 3d | 13m | 18m | 0.03d | 1.4d | yes | yes | TI 2004
tlc072 | dual | CMOS | 4.5m 16m 17m | - - | 0.5m 0.8m | 10m | 16m | 7m | 0.0015m | 1.9m | yes | no | -
tlc074 | quad | CMOS | 4.5m 16m 17m | - - | 0.5m 0.8m | 10m | 16m | 7m | 0.0015m | 1.9m | yes | no | -
ne5532 | dual | bipolar | 10m 30p 44m | 2m 2m | 2m 2m | 10m | 9m | 5m | 200m | 4m | yes | no | -
ne5534 | s5534 | bipolar | 10m 30p 44m | 2m 2m | 2m 2m | 10m | 13m | 4m | 500m | 4m | no | no | -
lm833 | dual | bipolar | 10m 30p 36m | 1.5m 1.5m | 2m 2m | 15m | 7m | 4.5m | 500m | 2.5m | yes | no | -
lm837 | quad | bipolar | 10m 36p 36m | 2m 2m | 2m 2m | 25m | 10m | 4.5m | 500m | 2.5m | yes | no | -
lm358 | dual | bipolar | 3p 32p 32p | 0.005d 1.5d | 0d 1.5d | 0.7d | 0.3d | 40d | 20d | 0.35p | yes | yes | TI 2018
lm324 | quad | bipolar | 3p 32p 32p | 0.005p 1.5p | 0p 1.5p | 1.2m | 0.5m | 35m | 20m | 0.175m | yes | yes | the quad of the LM358
lm2904 | dual | bipolar | 3m 26m 26m | 0.005p 1.5p | 0p 1.5p | 0.7m | 0.3m | 40m | 20m | 0.35m | yes | yes | the automotive grade of the LM358
lm2902 | quad | bipolar | 3m 26m 26m | 0.005p 1.5p | 0p 1.5p | 1.2m | 0.5m | 35m | 20m | 0.175m | yes | yes | the automotive grade of the LM324
lm321 | - | bipolar | 3m 32m 32m | 0.005p 1.5p | 0p 1.5p | 1m | 0.4m | 40m | 45m | 0.4m | yes | yes | a single LM358 in SOT-23
lmv321 | - | CMOS | 2.7m 5.5m 5.5m | 0.05m 0.05m | 0m 1m | 1m | 1m | 39m | 15m | 0.13m | yes | no | -
lmv358 | dual | CMOS | 2.7m 5.5m 5.5m | 0.05m 0.05m | 0m 1m | 1m | 1m | 39m | 15m | 0.13m | yes | no | -
lmv324 | quad | CMOS | 2.7m 5.5m 5.5m | 0.05m 0.05m | 0m 1m | 1m | 1m | 39m | 15m | 0.13m | yes | no | -
4558 | dual | bipolar | 8m 36d 36d | 1d 1d | 1d 1d | 3m | 1d | 9m | 60d | 1.75m | yes | no | BA4558 sheet; TI's RC4558 is recalled at 1.7 V/µs and 30 V
njm4556 | dual | bipolar | 4m 36p 36m | 1.5m 1.5m | 1.5m 1.5m | 8m | 3m | 8m | 50m | 4.5m | yes | no | -
4559 | dual | bipolar | 8m 36p 36m | 1m 1m | 1m 1m | 4m | 2m | 8m | 40m | 1.75m | yes | no | -
4560 | dual | bipolar | 8m 36p 36m | 1m 1m | 1m 1m | 10m | 4m | 8m | 40m | 2.2m | yes | no | -
4580 | dual | bipolar | 4m 36p 36m | 1.5m 1.5m | 1.5m 1.5m | 15m | 5m | 5m | 100m | 3m | yes | no | -
njm2043 | dual | bipolar | 8m 36p 36m | 2m 2m | 2m 2m | 14m | 6m | 6m | 250m | 3m | yes | no | -
njm2068 | dual | bipolar | 8m 36p 36m | 1.5m 1.5m | 1.5m 1.5m | 27m | 6m | 5m | 150m | 2.5m | yes | no | -
njm2114 | dual | bipolar | 6m 44p 44m | 2m 2m | 2m 2m | 13m | 15m | 3.3m | 500m | 4.5m | yes | no | -
mc33078 | dual | bipolar | 10m 36p 36m | 1.3m 1.3m | 1m 1m | 16m | 7m | 4.5m | 300m | 2m | yes | no | -
mc33079 | quad | bipolar | 10m 36p 36m | 1.3m 1.3m | 1m 1m | 16m | 7m | 4.5m | 300m | 2m | yes | no | -
mc33172 | dual | bipolar | 3m 44m 44m | 0.2m 1m | 0m 1.8m | 1.8m | 2.1m | 32m | 20m | 0.2m | yes | no | -
mc33174 | quad | bipolar | 3m 44m 44m | 0.2m 1m | 0m 1.8m | 1.8m | 2.1m | 32m | 20m | 0.2m | yes | no | -
mc33178 | dual | bipolar | 4m 36m 36m | 1.2m 1.2m | 1m 1m | 5m | 2m | 8m | 100m | 0.42m | yes | no | -
mc33179 | quad | bipolar | 4m 36m 36m | 1.2m 1.2m | 1m 1m | 5m | 2m | 8m | 100m | 0.42m | yes | no | -
mc1458 | dual | bipolar | 10m 36p 36m | 1m 1m | 2m 2m | 1m | 0.5m | 45m | 80m | 1.2m | yes | no | -
opa134 | sop07 | JFET | 5m 36p 36m | 1.2d 1.2d | 2.5d 2.5d | 8m | 20d | 8d | 0.005d | 4d | yes | no | the OPA2134's audio reference page
opa2134 | dual | JFET | 5m 36p 36m | 1.2d 1.2d | 2.5d 2.5d | 8m | 20d | 8d | 0.005d | 4d | yes | no | audio reference page
opa4134 | quad | JFET | 5m 36p 36m | 1.2d 1.2d | 2.5d 2.5d | 8m | 20d | 8d | 0.005d | 4d | yes | no | the OPA2134's audio reference page
opa1641 | sbare | JFET | 4.5d 36d 40d | 0.2m 0.2m | -0.1m 3.5d | 11m | 20m | 5.1m | 0.002m | 1.8m | yes | no | TI 2010; surface mount only
opa1642 | dual | JFET | 4.5d 36d 40d | 0.2m 0.2m | -0.1m 3.5d | 11m | 20m | 5.1m | 0.002m | 1.8m | yes | no | TI 2010; surface mount only
opa1644 | quad | JFET | 4.5d 36d 40d | 0.2m 0.2m | -0.1m 3.5d | 11m | 20m | 5.1m | 0.002m | 1.8m | yes | no | TI 2010; surface mount only
opa1678 | dual | CMOS | 4.5m 36m 40m | 0.8m 0.8m | 0.5m 2m | 16m | 9m | 4.5m | 0.01m | 2m | yes | no | -
opa1679 | quad | CMOS | 4.5m 36m 40m | 0.8m 0.8m | 0.5m 2m | 16m | 9m | 4.5m | 0.01m | 2m | yes | no | -
opa1602 | dual | bipolar | 5m 36m 40m | 0.6m 0.6m | 2m 2m | 35m | 20m | 2.5m | 20m | 2.6m | yes | no | -
opa1604 | quad | bipolar | 5m 36m 40m | 0.6m 0.6m | 2m 2m | 35m | 20m | 2.5m | 20m | 2.6m | yes | no | -
opa2277 | dual | bipolar | 4m 36m 36m | 1.2m 1.2m | 2m 2m | 1m | 0.8m | 8m | 0.5m | 0.8m | yes | no | -
opa340 | sbare | CMOS | 2.7m 5.5m 7m | 0.005m 0.005m | -0.3m -0.3m | 5.5m | 6m | 25m | 0.0002m | 0.75m | yes | no | -
opa2340 | dual | CMOS | 2.7m 5.5m 7m | 0.005m 0.005m | -0.3m -0.3m | 5.5m | 6m | 25m | 0.0002m | 0.75m | yes | no | -
opa4340 | quad | CMOS | 2.7m 5.5m 7m | 0.005m 0.005m | -0.3m -0.3m | 5.5m | 6m | 25m | 0.0002m | 0.75m | yes | no | -
opa2604 | dual | JFET | 9m 48p 50m | 3m 3m | 3m 3m | 20m | 25m | 10m | 0.1m | 5.3m | yes | no | -
lm741 | s741 | bipolar | 10m 36p 44m | 1m 1m | 2m 2m | 1m | 0.5m | 25m | 80m | 1.7m | yes | no | -
lm301 | s5534 | bipolar | 10m 36m 36m | 1m 1m | 2m 2m | 1m | 0.5m | 25m | 70m | 1.8m | no | no | -
lm318 | s5534 | bipolar | 10m 40p 40m | 2m 2m | 3.5m 3.5m | 15m | 70m | 14m | 150m | 5m | yes | no | -
lf351 | s741 | JFET | 7m 36p 36m | 1.5m 1.5m | 3m 0m | 4m | 13m | 25m | 0.05m | 1.8m | yes | yes | -
lf353 | dual | JFET | 7m 36p 36d | 1.5m 1.5m | 3m 0m | 4d | 13d | 25d | 0.05d | 1.8d | yes | yes | National
lf347 | quad | JFET | 7m 36p 36m | 1.5m 1.5m | 3m 0m | 4m | 13m | 25m | 0.05m | 1.8m | yes | yes | -
lf355 | s741 | JFET | 10m 36p 40m | 2m 2m | 3m 0m | 2.5m | 5m | 20m | 0.03m | 2m | yes | yes | -
lf356 | s741 | JFET | 10m 36p 40m | 2m 2m | 3m 0m | 5m | 12m | 12m | 0.03m | 5m | yes | yes | -
lf357 | s741 | JFET | 10m 36p 40m | 2m 2m | 3m 0m | 20m | 50m | 12m | 0.03m | 5m | no | yes | -
lf411 | s741 | JFET | 7m 36p 36m | 1.5m 1.5m | 3.5m 0.5m | 4m | 15m | 25m | 0.05m | 1.8m | yes | yes | -
lf412 | dual | JFET | 7m 36p 36m | 1.5d 1.5d | 3.5d 0.5d | 4m | 15m | 25m | 0.05d | 1.8d | yes | yes | TI 2013
lm4562 | dual | bipolar | 5m 34p 36m | 1m 1m | 2m 2m | 55m | 20m | 2.7m | 10m | 5m | yes | no | -
lm6172 | dual | bipolar | 5.5m 36m 36m | 1.5m 1.5m | 1.5m 1.5m | 100m | 3000m | 12m | 1200m | 2.3m | yes | no | -
mcp601 | sbare | CMOS | 2.7d 6d 7d | 0.02d 0.02d | -0.3m 1.2m | 2.8d | 2.3d | 29m | 0.001m | 0.23d | yes | no | Microchip DS21314
mcp602 | dual | CMOS | 2.7d 6d 7d | 0.02d 0.02d | -0.3m 1.2m | 2.8d | 2.3d | 29m | 0.001m | 0.23d | yes | no | Microchip DS21314
mcp604 | quad | CMOS | 2.7d 6d 7d | 0.02d 0.02d | -0.3m 1.2m | 2.8d | 2.3d | 29m | 0.001m | 0.23d | yes | no | Microchip DS21314
mcp6001 | - | CMOS | 1.8d 6d 7m | 0.025d 0.025d | -0.3d -0.3d | 1d | 0.6m | 28m | 0.001m | 0.1d | yes | no | Microchip MCP6001/2/4
mcp6002 | dual | CMOS | 1.8d 6d 7m | 0.025d 0.025d | -0.3d -0.3d | 1d | 0.6m | 28m | 0.001m | 0.1d | yes | no | Microchip MCP6001/2/4
mcp6004 | quad | CMOS | 1.8d 6d 7m | 0.025d 0.025d | -0.3d -0.3d | 1d | 0.6m | 28m | 0.001m | 0.1d | yes | no | Microchip MCP6001/2/4
mcp6021 | sbare | CMOS | 2.5d 5.5d 7d | 0.02d 0.02d | -0.3d -0.3d | 10d | 7m | 8.7d | 0.001m | 1d | yes | no | Microchip MCP6021/2/4
mcp6022 | dual | CMOS | 2.5d 5.5d 7d | 0.02d 0.02d | -0.3d -0.3d | 10d | 7m | 8.7d | 0.001m | 1d | yes | no | Microchip MCP6021/2/4
mcp6024 | quad | CMOS | 2.5d 5.5d 7d | 0.02d 0.02d | -0.3d -0.3d | 10d | 7m | 8.7d | 0.001m | 1d | yes | no | Microchip MCP6021/2/4
tlc271 | s741 | CMOS | 3d 16d 18m | 0d 1.2m | -0.2d 0.8m | 1.7m | 3.6m | 25d | 0.0007m | 0.7m | yes | no | TI TLC27x
tlc272 | dual | CMOS | 3d 16d 18m | 0d 1.2m | -0.2d 0.8m | 1.7m | 3.6m | 25d | 0.0007m | 0.7m | yes | no | TI TLC27x
tlc274 | quad | CMOS | 3d 16d 18m | 0d 1.2m | -0.2d 0.8m | 1.7m | 3.6m | 25d | 0.0007m | 0.7m | yes | no | TI TLC27x
tlc277 | dual | CMOS | 3d 16d 18m | 0d 1.2m | -0.2d 0.8m | 1.7m | 3.6m | 25d | 0.0007m | 0.7m | yes | no | TI TLC27x, selected for offset
tlc279 | quad | CMOS | 3d 16d 18m | 0d 1.2m | -0.2d 0.8m | 1.7m | 3.6m | 25d | 0.0007m | 0.7m | yes | no | TI TLC27x, selected for offset
tlc2272 | dual | CMOS | 4.4d 16d 16m | 0.01d 0.01d | -0.3d 1m | 2.2d | 3.6d | 9d | 0.001d | 1.1d | yes | no | TI TLC2272
tlc2274 | quad | CMOS | 4.4d 16d 16m | 0.01d 0.01d | -0.3d 1m | 2.2d | 3.6d | 9d | 0.001d | 1.1d | yes | no | TI TLC2272
tlv2371 | sbare | CMOS | 2.7d 16d 16.5m | 0.05d 0.05d | 0d 0d | 3d | 2.4d | 39m | 0.001d | 0.55d | yes | no | TI TLV237x
tlv2372 | dual | CMOS | 2.7d 16d 16.5m | 0.05d 0.05d | 0d 0d | 3d | 2.4d | 39m | 0.001d | 0.55d | yes | no | TI TLV237x
tlv2374 | quad | CMOS | 2.7d 16d 16.5m | 0.05d 0.05d | 0d 0d | 3d | 2.4d | 39m | 0.001d | 0.55d | yes | no | TI TLV237x
tlv9062 | dual | CMOS | 1.8m 5.5m 6m | 0.02m 0.02m | -0.1m -0.1m | 10m | 6.5m | 10m | 0.0005m | 0.54m | yes | no | -
tlv9064 | quad | CMOS | 1.8m 5.5m 6m | 0.02m 0.02m | -0.1m -0.1m | 10m | 6.5m | 10m | 0.0005m | 0.54m | yes | no | -
lmc6482 | dual | CMOS | 3d 15.5d 16m | 0.02d 0.02d | 0d 0d | 1.5m | 1.3m | 37m | 0.00002d | 0.65m | yes | no | National/TI; another maker's LMC6482 is other silicon
lmc6484 | quad | CMOS | 3d 15.5d 16m | 0.02d 0.02d | 0d 0d | 1.5m | 1.3m | 37m | 0.00002d | 0.65m | yes | no | National/TI
lmc6062 | dual | CMOS | 4.5m 15.5m 16m | 0.02m 0.02m | -0.1m 2m | 0.1m | 0.035m | 83m | 0.00001m | 0.02m | yes | no | -
lmc6082 | dual | CMOS | 4.5m 15.5m 16m | 0.02m 0.02m | -0.1m 2m | 1.3m | 1.5m | 22m | 0.00001m | 0.45m | yes | no | -
ts912 | dual | CMOS | 2.7m 16m 18m | 0.05m 0.05m | 0m 0m | 1.4m | 1m | 30m | 0.001m | 0.4m | yes | no | -
lt1013 | dual | bipolar | 3.4m 44p 44m | 0.015d 1m | 0d 1.5m | 0.8m | 0.4m | 22m | 15m | 0.35m | yes | no | Linear Technology and TI LT1013
lt1014 | quad | bipolar | 3.4m 44p 44m | 0.015d 1m | 0d 1.5m | 0.8m | 0.4m | 22m | 15m | 0.35m | yes | no | the quad of the LT1013
lt1012 | sop07 | bipolar | 2.4m 40m 40m | 1m 1m | 1m 1m | 0.8m | 0.2m | 14m | 0.025m | 0.38m | yes | no | -
op07 | sop07 | bipolar | 6m 36p 44m | 2m 2m | 1m 1m | 0.6m | 0.3m | 9.6m | 1.5m | 2.7m | yes | no | -
op27 | sop07 | bipolar | 8m 36p 44m | 1.2d 1.2d | 2.7d 2.7d | 8d | 2.8d | 3d | 10d | 3m | yes | no | Analog Devices OP27
op37 | sop07 | bipolar | 8m 36m 44m | 1.2m 1.2m | 2.7m 2.7m | 63m | 17m | 3m | 10m | 3m | no | no | -
op77 | sop07 | bipolar | 6m 36m 44m | 2m 2m | 1m 1m | 0.6m | 0.3m | 9.6m | 1.2m | 2m | yes | no | -
op177 | sop07 | bipolar | 6m 36m 44m | 2m 2m | 1m 1m | 0.6m | 0.3m | 10m | 1.2m | 1.6m | yes | no | -
op249 | dual | JFET | 9m 36p 36m | 2.5m 2.5m | 3m 2m | 4.7m | 22m | 17m | 0.03m | 3.5m | yes | no | -
op275 | dual | bipolar | 9m 44p 44m | 1.5m 1.5m | 4.5m 4.5m | 9m | 22m | 6m | 100m | 2m | yes | no | -
op279 | dual | bipolar | 4.5m 12m 16m | 0.1m 0.1m | 0m 0m | 5m | 3m | 22m | 300m | 1.9m | yes | no | -
ca3130 | s5534 | CMOS | 5m 16m 16m | 0.01m 0.01m | -0.5m 3m | 15m | 10m | 23m | 0.005m | 2m | no | no | -
ca3140 | sstrobe | CMOS | 4d 36d 36m | 0.1m 2.5m | -0.5d 2.5m | 4.5m | 9m | 40m | 0.01d | 4m | yes | no | Harris/Intersil CA3140
ca3240 | dual | CMOS | 4m 36m 36m | 0.1m 2.5m | -0.5m 2.5m | 4.5m | 9m | 40m | 0.01m | 4m | yes | no | -
lm675 | - | bipolar | 16m 60m 60m | 3m 3m | 3m 3m | 5.5m | 8m | - | 200m | 18m | no | no | -
l272 | - | bipolar | 4m 28m 28m | 1m 1m | 0m 1.5m | 0.35m | 1m | - | 300m | 8m | yes | no | -
`;

const NAMES: Readonly<Record<string, string>> = { JFET: 'JFET input', CMOS: 'CMOS', bipolar: 'bipolar' };
const PIN_SOURCE = 'KiCad 6 symbol or the pin order common to the type';
const CAUTIONS: Readonly<Record<string, readonly Fact<string>[]>> = {
  ne5532: [
    practice(
      'Diodes across the inputs conduct beyond about ±0.6 V: no comparator, no large differential voltage.',
      'NE5532 schematic in every datasheet',
    ),
  ],
  ne5534: [practice('Not stable below a gain of 3 without an external capacitor of about 22 pF.', 'NE5534 datasheets')],
  op27: [practice('Diodes across the inputs conduct beyond about ±0.6 V.', 'OP27 datasheet')],
  lt1013: [
    practice('The SO-8 version of one maker has another pin order (1 IN1+, 2 V-, 3 IN2+ …).', 'TI LT1013 datasheet'),
  ],
  tl072: [recalled('Newer silicon with suffix H works from 4.5 V and is faster.')],
  lm358: [recalled('Crossover distortion in audio; sinks only some tens of microamperes near ground.')],
};

function input(text: string): Fact<'JFET' | 'CMOS' | 'bipolar'> {
  if (text !== 'JFET' && text !== 'CMOS' && text !== 'bipolar')
    throw new RangeError(`The op-amp table holds the input kind "${text}".`);
  return practice(text, 'the type’s input stage, on the first page of its datasheet');
}

function readRow(line: string): OpAmpFamily {
  const cells = line.split('|').map((cell) => cell.trim());
  const [
    id = '',
    layout = '',
    kind = '',
    supply = '',
    out = '',
    common = '',
    gbw = '-',
    slew = '-',
    noise = '-',
    bias = '-',
    current = '-',
  ] = cells;
  const [stable, reversal, source = ''] = cells.slice(11);
  const layoutRow = LAYOUTS[layout];
  const [outLow = '-', outHigh = '-'] = out.split(' ');
  const [inLow = '-', inHigh = '-'] = common.split(' ');
  const [pins, units, word] = layoutRow ?? [null, 1, 'single'];
  return {
    id,
    kind: 'ic',
    group: 'op-amp',
    title: `${word} op-amp, ${NAMES[kind] ?? kind}`,
    units,
    pinOut: pins === null ? null : practice(pins, PIN_SOURCE),
    input: input(kind),
    supply: supplyOf(
      supply,
      source === '-' || supply.includes('p')
        ? 'run on ±12 to ±15 V throughout the trade; exact limit to be read in the datasheet'
        : source,
    ),
    outputAboveNegativeVolts: noted(outLow, source),
    outputBelowPositiveVolts: noted(outHigh, source),
    inputAboveNegativeVolts: noted(inLow, source),
    inputBelowPositiveVolts: noted(inHigh, source),
    gainBandwidthMegahertz: noted(gbw, source),
    slewVoltsPerMicrosecond: noted(slew, source),
    noiseNanovolts: noted(noise, source),
    biasNanoamperes: noted(bias, source),
    supplyMilliamperes: noted(current, source),
    unityGainStable: practice(stable === 'yes', 'stated on the first page of the type’s datasheet'),
    phaseReversal: reversal === 'yes' ? practice(true, 'known of JFET-bipolar and LM358-like inputs') : recalled(false),
    cautions: CAUTIONS[id] ?? [],
  };
}

export const OP_AMP_FAMILIES: readonly OpAmpFamily[] = TABLE.trim().split('\n').map(readRow);
