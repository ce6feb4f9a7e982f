/**
 * What is known of a part family: its pins, limits and habits, each fact with the basis it rests on. Checks refuse or
 * approve on `standard`, `datasheet` and `common-practice`; a fact from `memory` only makes them ask or remark.
 */
import type { PartKind } from '../part-spec';

export type Basis = 'standard' | 'datasheet' | 'common-practice' | 'memory';

export interface Fact<T> {
  readonly value: T;
  readonly basis: Basis;
  /** The document, dataset or habit the fact comes from, in words. */
  readonly source: string;
}

/** Pin 1 stands first. Gate inputs of one unit are A, B, C … of its number; supplies are VDD/VSS/VEE, V+/V-, GND. */
export interface PinOut {
  readonly pins: readonly string[];
  /** The case that this order belongs to. For three-lead parts pin 1 is left, the flat or marked face towards you, leads down. */
  readonly package: string;
}

/** Volts between the most positive and the most negative supply pin. */
export interface Supply {
  readonly minimumVolts: Fact<number> | null;
  readonly maximumVolts: Fact<number> | null;
  readonly absoluteVolts: Fact<number> | null;
}

interface Common {
  readonly id: string;
  readonly kind: PartKind;
  /** What a builder calls it, such as "quad NAND, Schmitt". */
  readonly title: string;
  /** Gates, amplifiers, switches or devices in one package. */
  readonly units: number;
  readonly pinOut: Fact<PinOut> | null;
  readonly cautions: readonly Fact<string>[];
}

export interface SchmittThreshold {
  readonly maker: string;
  readonly supplyVolts: number;
  readonly upVolts: number;
  readonly downVolts: number;
  readonly basis: Basis;
  readonly source: string;
}

export type LogicSeries = '4000' | 'ttl' | 'ls' | 'hc' | 'hct' | 'hcu';

export interface LogicFamily extends Common {
  readonly group: 'logic';
  readonly series: LogicSeries;
  /** One unit's function, such as NAND2; equal words mean that units do the same. */
  readonly unitFunction: string;
  readonly schmittInputs: Fact<boolean>;
  readonly openDrain: Fact<boolean>;
  readonly unbuffered: boolean;
  readonly supply: Supply;
  readonly thresholds: readonly SchmittThreshold[];
}

export interface SwitchFamily extends Common {
  readonly group: 'switch';
  readonly unitFunction: string;
  readonly supply: Supply;
  /** Typical, at the supply named in the source. */
  readonly onOhms: Fact<number> | null;
}

export interface OpAmpFamily extends Common {
  readonly group: 'op-amp';
  readonly input: Fact<'JFET' | 'CMOS' | 'bipolar'>;
  readonly supply: Supply;
  /** How near the output comes to a rail, in volts, at light load. */
  readonly outputAboveNegativeVolts: Fact<number> | null;
  readonly outputBelowPositiveVolts: Fact<number> | null;
  /** How near inputs may come to a rail; negative where they may pass it. */
  readonly inputAboveNegativeVolts: Fact<number> | null;
  readonly inputBelowPositiveVolts: Fact<number> | null;
  readonly gainBandwidthMegahertz: Fact<number> | null;
  readonly slewVoltsPerMicrosecond: Fact<number> | null;
  /** nV/√Hz at 1 kHz. */
  readonly noiseNanovolts: Fact<number> | null;
  readonly biasNanoamperes: Fact<number> | null;
  readonly supplyMilliamperes: Fact<number> | null;
  readonly unityGainStable: Fact<boolean>;
  readonly phaseReversal: Fact<boolean> | null;
}

/** Everything with many pins whose exact type matters: OTA, comparator, timer, VCO, filter, delay, reference, array. */
export interface ExactIcFamily extends Common {
  readonly group: 'ota' | 'comparator' | 'timer' | 'sound' | 'reference' | 'array';
  readonly unitFunction: string;
  readonly supply: Supply;
  readonly output: Fact<'push-pull' | 'open-collector' | 'current' | 'light-drive'> | null;
  /** Families that do the same on the same pins, with what differs. */
  readonly near: Readonly<Record<string, Fact<string>>>;
}

export interface RegulatorFamily extends Common {
  readonly group: 'regulator';
  readonly polarity: 'positive' | 'negative' | 'converter';
  /** Output volts without sign; null when adjustable. */
  readonly outputVolts: number | null;
  readonly inputMaximumVolts: Fact<number> | null;
  readonly outputAmperes: Fact<number> | null;
  readonly dropoutVolts: Fact<number> | null;
  readonly tab: string | null;
}

export interface BipolarFamily extends Common {
  readonly group: 'bipolar';
  readonly polarity: 'NPN' | 'PNP';
  readonly darlington: boolean;
  readonly matchedPair: boolean;
  readonly collectorEmitterVolts: Fact<number> | null;
  readonly collectorAmperes: Fact<number> | null;
  /** Gain range of the whole family and of its suffix groups. */
  readonly gain: Fact<readonly [number, number]> | null;
  readonly gainGroups: Readonly<Record<string, readonly [number, number]>>;
  readonly lowNoise: boolean;
}

export interface FetFamily extends Common {
  readonly group: 'jfet' | 'mosfet';
  readonly channel: 'N' | 'P';
  readonly drainSourceVolts: Fact<number> | null;
  readonly drainAmperes: Fact<number> | null;
  /** JFETs: saturation current in mA and gate cut-off volts, as ranges. */
  readonly saturationMilliamperes: Fact<readonly [number, number]> | null;
  readonly cutOffVolts: Fact<readonly [number, number]> | null;
}

export type DiodeType = 'switching' | 'rectifier' | 'schottky-small' | 'schottky-power' | 'germanium' | 'low-leakage';

export interface DiodeFamily extends Common {
  readonly group: 'diode';
  readonly diodeType: Fact<DiodeType>;
  readonly reverseVolts: Fact<number> | null;
  readonly forwardAmperes: Fact<number> | null;
}

export interface ZenerFamily extends Common {
  readonly group: 'zener';
  readonly zenerVolts: Fact<number>;
  readonly watts: Fact<number>;
}

export interface OptocouplerFamily extends Common {
  readonly group: 'optocoupler';
  readonly output: 'transistor' | 'darlington' | 'logic' | 'fet' | 'resistor' | 'triac';
}

export type Family =
  | LogicFamily
  | SwitchFamily
  | OpAmpFamily
  | ExactIcFamily
  | RegulatorFamily
  | BipolarFamily
  | FetFamily
  | DiodeFamily
  | ZenerFamily
  | OptocouplerFamily;
export type FamilyGroup = Family['group'];
