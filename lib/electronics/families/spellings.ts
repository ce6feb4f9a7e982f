/**
 * How each family's number is written, without suffixes for grade, package and reel. Kept apart from the facts so that
 * reading a parts list needs only this table; a test holds the two to the same ids. Bare numbers (`5532`) are heads
 * too: family-of.ts accepts those only with a suffix that is no unit.
 */
import type { PartKind } from '../part-spec';

export interface Spelling {
  readonly id: string;
  readonly kind: PartKind;
  /** Upper-case heads; the id itself in upper case is always one. */
  readonly heads: readonly string[];
}

/** `id` alone, or `id=HEAD,HEAD` where other makers' numbers name the same family. */
function group(kind: PartKind, rows: string): Spelling[] {
  return rows
    .trim()
    .split(/\s+/)
    .map((row) => {
      const [id = '', others] = row.split('=');
      const own = /^\d+$/.test(id) && others !== undefined ? [] : [id.toUpperCase()];
      return { id, kind, heads: [...own, ...(others === undefined ? [] : others.split(','))] };
    });
}

/** 4000-series numbers carried; maker's prefix and suffix are read by rule. */
export const LOGIC_4000: readonly string[] =
  `4000 4001 4002 4007 4009 4010 4011 4012 4013 4015 4016 4017 4018 4020 4021 4022 4023 4024 4025 4027 4028 4029 4030 4040 4042
   4043 4044 4046 4047 4049 4050 4051 4052 4053 4060 4066 4067 4068 4069 4070 4071 4072 4073 4075 4077 4078 4081 4082 4093
   4094 4097 4098 40106 40193 4504 4510 4511 4516 4518 4520 4528 4538 4541 4543 4584`
    .trim()
    .split(/\s+/);

/** 74-series function numbers carried, with the technologies that make each (`ttl` is plain 74xx). */
export const LOGIC_74: Readonly<Record<string, readonly string[]>> = {
  '00': ['ttl', 'ls', 'hc', 'hct'],
  '02': ['ttl', 'ls', 'hc', 'hct'],
  '04': ['ttl', 'ls', 'hc', 'hct', 'hcu'],
  '08': ['ttl', 'ls', 'hc', 'hct'],
  '10': ['ls', 'hc', 'hct'],
  '14': ['ttl', 'ls', 'hc', 'hct'],
  '20': ['ls', 'hc', 'hct'],
  '32': ['ttl', 'ls', 'hc', 'hct'],
  '74': ['ttl', 'ls', 'hc', 'hct'],
  '86': ['ttl', 'ls', 'hc', 'hct'],
  '123': ['ls', 'hc', 'hct'],
  '132': ['ls', 'hc', 'hct'],
  '138': ['ls', 'hc', 'hct'],
  '164': ['ls', 'hc', 'hct'],
  '165': ['ls', 'hc', 'hct'],
  '266': ['ls', 'hc'],
  '595': ['ls', 'hc', 'hct'],
  '4017': ['hc', 'hct'],
  '4020': ['hc', 'hct'],
  '4024': ['hc', 'hct'],
  '4040': ['hc', 'hct'],
  '4046': ['hc', 'hct'],
  '4049': ['hc'],
  '4050': ['hc'],
  '4051': ['hc', 'hct'],
  '4052': ['hc', 'hct'],
  '4053': ['hc', 'hct'],
  '4060': ['hc', 'hct'],
  '4066': ['hc', 'hct'],
  '4067': ['hc', 'hct'],
  '4075': ['hc', 'hct'],
  '4316': ['hc', 'hct'],
  '4520': ['hc', 'hct'],
  '4538': ['hc', 'hct'],
};

const OP_AMPS = group(
  'ic',
  `tl071 tl072=TL072,072 tl074 tl061 tl062 tl064 tl081 tl082 tl084 tlc072 tlc074 tlc271 tlc272 tlc274 tlc277 tlc279 tlc2272 tlc2274
   tlv2371 tlv2372 tlv2374 tlv9062 tlv9064
   ne5532=SA5532,SE5532,NJM5532,JRC5532,LM5532,5532 ne5534=SA5534,SE5534,NJM5534,JRC5534,5534
   lm358=NJM358,KA358,LM158,LM258,MC358,358 lm324=LM124,LM224,KA324,MC324,NJM324,324 lm2902=NJM2902,KA2902 lm2904=NJM2904,KA2904
   lm321 lmv321 lmv358 lmv324
   4558=RC4558,NJM4558,JRC4558,MC4558,BA4558,KA4558,UPC4558,RM4558,4558 njm4556=NJM4556,JRC4556 4559=NJM4559,RC4559,JRC4559,4559
   4560=NJM4560,RC4560,JRC4560,4560 4580=NJM4580,RC4580,JRC4580,BA4580,4580 njm2043 njm2068=NJM2068,JRC2068 njm2114=NJM2114,JRC2114
   lm833=LM833,MC833,NJM833 lm837 mc33078 mc33079 mc33172 mc33174 mc33178 mc33179 mc1458=LM1458,MC1458,RC1458,KA1458,1458
   opa134 opa2134 opa4134 opa1641 opa1642 opa1644 opa1678 opa1679 opa2277 opa340 opa2340 opa4340 opa2604 opa1602 opa1604
   lm741=UA741,µA741,MC1741,KA741,CA741,UPC741,741 lm301 lm318 lf351 lf353 lf347 lf355 lf356 lf357 lf411 lf412 lm4562 lm6172
   mcp601 mcp602 mcp604 mcp6001 mcp6002 mcp6004 mcp6021 mcp6022 mcp6024 lmc6482 lmc6484 lmc6062 lmc6082 ts912
   lt1013 lt1014 lt1012 op07 op27 op37 op77 op177 op249 op275 op279 ca3130 ca3140 ca3240 lm675 l272 lm386=LM386,NJM386,JRC386`,
);

const OTA_COMPARATOR_TIMER = group(
  'ic',
  `lm13700=LM13700,NJM13700,V13700,AS13700,XD13700,13700 lm13600=NJM13600,XR13600,13600 ca3080=CA3080,V3080,LM3080 as13704
   ca3280 lm3900=LM3900,MC3401,CA3401
   lm311=LM211,LM111,UA311,NJM311,KA311,311 lm319 lm339=LM239,LM139,KA339,NJM339,339 lm393=LM193,LM293,KA393,NJM393,393 lm2901 lm2903
   tl331 lmv331 lmv339 lmv393 tlc372 tlc374
   ne555=SE555,SA555,NA555,LM555,NJM555,JRC555,MC1455,UA555,KA555,CA555,555 ne556=SE556,SA556,NA556,LM556,556
   icm7555=ICM7555,7555 icm7556=ICM7556,7556 tlc555 lmc555 tlc556 ne567=SE567,LM567,NJM567`,
);

const SWITCHES = group(
  'ic',
  'dg201 dg202 dg211 dg212 dg403 dg411=DG411,MAX312 dg412=DG412,MAX313 dg413=DG413,MAX314 dg419=DG419,ADG419 dg441 dg442 dg308 dg309 adg1414 max333',
);

const SOUND = group(
  'ic',
  `as3340=CEM3340,AS3340,V3340,3340 as3320=CEM3320,AS3320,V3320 as3310=CEM3310,AS3310,V3310 as3330=CEM3330,AS3330
   as3360=CEM3360,AS3360,3360 as3345=CEM3345,AS3345 cem3372 ssi2164=SSM2164,V2164,AS2164,2164 ssi2144=SSM2044,SSI2144 ssi2130 ssi2131 ssi2190
   mn3005=MN3005,BL3005 mn3007=MN3007,V3007,BL3007 mn3207=MN3207,V3207,BL3207 mn3208=V3208,BL3208 mn3205=V3205 mn3101 mn3102=MN3102,V3102,BL3102
   mn3204 sad1024 tda1022 pt2399=PT2399,CD2399,SC2399,ES2399 that2180 that2181 ssm2018 xr2206 icl8038 ad633 mc1496=LM1496,MC1496
   ne570=NE570,SA570 ne571=SA571,V571 lf398 lm3914 lm3915 lm3916 ym2149 ad654 lm331=LM331 ba6110 ba662
   ca3046=LM3046,CA3046 ca3086=CA3086,LM3086 that300 that320 that340 uln2003=ULN2003,MC1413,ULQ2003 uln2803`,
);

const REFERENCES = group('ic', 'tl431=TL431,KA431,AZ431,LM431,CJ431,TL1431 lm399 ref01 ref02 ref03 ref102');

/** Fixed regulator ladders; the number is read by rule (`LM78L05ACZ`, `L7812CV`). */
export const LADDER_78: Readonly<Record<string, readonly string[]>> = {
  '78': ['05', '06', '08', '09', '10', '12', '15', '18', '24'],
  '79': ['05', '06', '08', '09', '10', '12', '15', '18', '24'],
  '78l': ['05', '06', '08', '09', '10', '12', '15', '18', '24'],
  '79l': ['05', '08', '12', '15', '18', '24'],
  '78m': ['05', '06', '08', '09', '12', '15', '24'],
  '79m': ['05', '08', '12', '15'],
};

/** Voltages of families whose number ends in one. */
export const LDO_VOLTS: Readonly<Record<string, readonly string[]>> = {
  lm1117: ['1.2', '1.5', '1.8', '2.5', '2.85', '3.3', '5', 'adj'],
  lm2940: ['5', '8', '9', '10', '12', '15'],
  lm2931: ['3.3', '5', 'adj'],
  lp2950: ['3', '3.3', '5'],
  lp2951: ['3', '3.3', '5'],
  mcp1700: ['1.2', '1.8', '2.5', '3', '3.3', '5'],
  lm4040: ['2', '2.5', '3', '4.1', '5', '8.2', '10'],
  lm336: ['2.5', '5'],
  lm385: ['1.2', '2.5', 'adj'],
};

const REGULATORS = group(
  'regulator',
  'lm317=LM317,NJM317,KA317,UC317,LM117,LM217,XD317 lm317l lm337=LM337,NJM337,KA337,LM137,LM237 lm337l lm338 lm350 lm723=UA723,LM723,723 l200 icl7660=ICL7660,TC7660,MAX1044,LMC7660 lt1054',
);

const BIPOLAR = group(
  'transistor',
  `2n3904 2n3906 bc546 bc547 bc548 bc549 bc550 bc556 bc557 bc558 bc559 bc560 2n2222=2N2222 pn2222=PN2222,KN2222 p2n2222=P2N2222
   2n2907 pn2907 2n4401 2n4403 bc337 bc338 bc327 bc328 bc516 bc517 bc639 bc640 mpsa06 mpsa13=MPSA13,KSP13 mpsa14 mpsa18 mpsa42 mpsa56 mpsa92
   2sc945=2SC945,C945 2sc1815=2SC1815,C1815,KSC1815 2sa1015=2SA1015,A1015,KSA1015 2sa733=2SA733,A733 2sc2240 2sa970 2n5087 2n5088 2n5089 2n5401 2n5551
   s8050=S8050,SS8050 s8550=S8550,SS8550 bc107 bc108 bc109 bc237 bc307 bc413 bc414 2n3053 2n3055 mj2955 2n2219
   bd135 bd136 bd137 bd138 bd139 bd140 tip31 tip32 tip41 tip42 tip120 tip121 tip122 tip125 tip126 tip127 tip2955 tip3055
   bc817 bc846 bc847 bc848 bc849 bc850 bc807 bc856 bc857 bc858 bc859 bc860 mmbt3904 mmbt3906 mmbt2222
   ssm2210 ssm2220 mat02 mat12 mat14 lm394 dmmt3904 dmmt3906 bcm847 bcm857 bcv61 bcv62`,
);

const FIELD_EFFECT = group(
  'transistor',
  `2n5457 2n5458 2n5459 2n3819 j201 j202 j111 j112 j113 bf244a=BF244A bf244b bf244c bf245a bf245b bf245c bf256b 2sk30=2SK30A,2SK30,K30A 2sk170 2sk208
   pn4391 pn4392 pn4393 mmbfj111 mmbfj112 mmbfj113 mmbfj201 mmbf5457 j175 j176 2n5460 2n5461 2n5462
   2n7000 2n7002 bs170 bs250 bss138 bss84 irf540 irf9540 irf520 irfz44 irlz44 vp0610 tp0610 bs107`,
);

const DIODES = group(
  'diode',
  `1n4148=1N4148,LL4148 1n4448=1N4448,LL4448 1n914 1n4001 1n4002 1n4003 1n4004 1n4005 1n4006 1n4007 1n5400 1n5401 1n5402 1n5404 1n5406 1n5407 1n5408
   1n5817=1N5817 1n5818 1n5819=1N5819,SS14 1n5820 1n5821 1n5822 bat41 bat42 bat43 bat46 bat48 bat54 bat54s bat54c bat54a bat85 bat86 sb140 sb160
   bav19 bav20 bav21 bav99 bav70 baw56 bas16 bas21 bas40 1n34 1n60 1n270 oa91 oa90 oa95 aa119 1n457 fdh300=FDH300,FDH333 1n3595 bav199 bav45`,
);

const OPTO = group(
  'optocoupler',
  `4n25 4n26 4n27 4n28 4n35 4n36 4n37 6n135 6n136 6n137 6n138 6n139 pc817=PC817,EL817,LTV-817,LTV817 pc827 pc847 cny17 h11l1 h11f1 h11f2 h11f3 h11d1 moc3021 til111 pc900
   vtl5c1 vtl5c2 vtl5c3 vtl5c4 nsl-32=NSL-32,NSL32 lcr0202 lcr0203`,
);

/** E24 ladders of Zener diodes: 1N4728A … 1N4764A in order, and the voltage codes of the European series. */
export const ZENER_1N47: readonly string[] =
  '3V3 3V6 3V9 4V3 4V7 5V1 5V6 6V2 6V8 7V5 8V2 9V1 10 11 12 13 15 16 18 20 22 24 27 30 33 36 39 43 47 51 56 62 68 75 82 91 100'.split(
    ' ',
  );
export const ZENER_1N52: readonly string[] =
  '2V4 2V5 2V7 2V8 3V0 3V3 3V6 3V9 4V3 4V7 5V1 5V6 6V0 6V2 6V8 7V5 8V2 8V7 9V1 10 11 12 13 14 15 16 17 18 19 20 22 24 25 27 28 30 33'.split(
    ' ',
  );
export const ZENER_EUROPEAN: readonly string[] =
  '2V4 2V7 3V0 3V3 3V6 3V9 4V3 4V7 5V1 5V6 6V2 6V8 7V5 8V2 9V1 10 11 12 13 15 16 18 20 22 24 27 30 33 36 39 43 47 51 56 62 68 75'.split(
    ' ',
  );
export const ZENER_SERIES: readonly string[] = ['bzx55', 'bzx79', 'bzx84', 'bzx85', 'bzv55', 'bzt52', 'bzv85'];

export const SPELLINGS: readonly Spelling[] = [
  ...OP_AMPS,
  ...OTA_COMPARATOR_TIMER,
  ...SWITCHES,
  ...SOUND,
  ...REFERENCES,
  ...REGULATORS,
  ...BIPOLAR,
  ...FIELD_EFFECT,
  ...DIODES,
  ...OPTO,
];
