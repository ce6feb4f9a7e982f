/** Five circuits of the demo workshop's own, each with parts lists as a drawing tool or a person might have written them. */

export interface DemoCircuit {
  readonly name: string;
  readonly description: string;
  readonly railsVolts: readonly number[];
  readonly revisions: readonly {
    readonly name: string;
    readonly fileName: string;
    readonly list: string;
    readonly freeze: boolean;
  }[];
  /** What lines do, by designator, for the checks that depend on it. */
  readonly uses: Readonly<Record<string, 'timing' | 'audio' | 'control' | 'decoupling' | 'logic' | 'power' | 'safety'>>;
}

export const demoCircuits: readonly DemoCircuit[] = [
  {
    name: 'Clock Divider',
    description: 'Schmitt clock with divisions by 2 to 64 and a reset',
    railsVolts: [12],
    uses: { U1: 'timing', C1: 'timing', U2: 'logic', U3: 'logic' },
    revisions: [
      {
        name: 'A',
        fileName: 'clock-divider.csv',
        freeze: true,
        list: `Reference,Qty,Value,Notes
"R1,R2",2,100k,1% MF
R3,1,22k,1%
"R4-R10",7,1k,1%
R11,1,4k7,1%
C1,1,100n,film
"C2,C3,C4",3,100n,X7R 50V
"C5,C6",2,10u 25V,el.
U1,1,CD4093BE,DIP-14
U2,1,CD4024BE,DIP-14
U3,1,CD4050BE,DIP-16
"D1-D7",7,LED red 3mm,
D8,1,1N5817,
Q1,1,2N3904,TO-92
RV1,1,A1M log,9 mm
"J1-J9",9,Jack 3.5 mm mono switched,
J10,1,Box header 2x5 2.54 mm,
PCB1,1,Clock divider board,
`,
      },
    ],
  },
  {
    name: 'Slope Pair',
    description: 'Two voltage-controlled slopes, cycling or triggered',
    railsVolts: [12, -12],
    uses: { U3: 'timing', C7: 'timing', C3: 'decoupling', U1: 'audio', U2: 'control' },
    revisions: [
      {
        name: 'B',
        fileName: 'slope-pair-main.csv',
        freeze: true,
        list: `Slope Pair main,,,,
Part,Qty,Value,Rating / type,
Resistors,,,,
"R1-R4",4,100k,1% MF 0207,
"R5,R6",2,4k7,1%,
R9,1,120k,1%,
"R10-R15",6,10k,1%,
R12a,1,1M,DNF,
Capacitors,,,,
"C1,C2",2,10u 25v,el.,
"C3-C6",4,100n,X7R 50V,
C7,1,2n2,C0G,
Semiconductors,,,,
"D1-D4",4,BAT42,,
"Q1,Q2",2,2N3904,TO-92,
"U1,U2",2,TL072,DIP-8,
U3,1,CD4093BE,DIP-14,
Controls,,,,
"RV1,RV2",2,B50k lin,9 mm,
"J1-J6",6,Jack 3.5 mm mono switched,,
`,
      },
      {
        name: 'C',
        fileName: 'slope-pair-main-c.csv',
        freeze: true,
        list: `Slope Pair main,,,,
Part,Qty,Value,Rating / type,
Resistors,,,,
"R1-R4",4,100k,1% MF 0207,
"R5,R6",2,4k7,1%,
R9,1,137k,1%,
"R10-R15",6,10k,1%,
Capacitors,,,,
"C1,C2",2,10u 25v,el.,
"C3-C6",4,100n,X7R 50V,
C7,1,2n2,C0G,
Semiconductors,,,,
"D1-D4",4,BAT42,,
"Q1,Q2",2,2N3904,TO-92,
"U1,U2",2,TL072,DIP-8,
U3,1,CD4093BE,DIP-14,
Controls,,,,
"RV1,RV2",2,B50k lin,9 mm,
RV3,1,A100k log,9 mm,
"J1-J6",6,Jack 3.5 mm mono switched,,
`,
      },
      {
        name: 'D',
        fileName: 'slope-pair-panel.csv',
        freeze: false,
        list: `Part,Qty,Value,Rating / type
R1,1,2.2m,5%
"R2-R5",3,10k,1%
RV1,1,B50k,9 mm
C1,1,100n,X7R
U1,1,TL074,DIP-14
`,
      },
    ],
  },
  {
    name: 'State-Variable Filter',
    description: 'Low, band and high pass, 12 dB an octave, voltage controlled',
    railsVolts: [12, -12],
    uses: { C1: 'audio', C2: 'audio', U1: 'audio', U2: 'audio' },
    revisions: [
      {
        name: 'A',
        fileName: 'state-variable.csv',
        freeze: true,
        list: `Designator;Value;Quantity;Note
R1, R2, R3, R4;100k;4;1%
R5, R6;220R;2;1%
R7, R8, R9;22k;3;1%
R10;1k PTC;1;tempco
C1, C2;1n;2;polypropylene
C3, C4, C5, C6;100n;4;X7R 50V
C7, C8;22u 25V;2;electrolytic
U1, U2;LM13700N;2;DIP-16
U3;TL074CN;1;DIP-14
U4;TL072CP;1;DIP-8
Q1, Q2;BC557B;2;TO-92
RV1, RV2;B100k lin;2;9 mm
RV3;A100k log;1;9 mm
TR1;10k;1;trimmer
J1, J2, J3, J4, J5, J6;Jack 3.5 mm mono switched;6;
J7;Box header 2x5 2.54 mm;1;
PCB1;State-variable filter board;1;
`,
      },
    ],
  },
  {
    name: 'Wave Folder',
    description: 'Six folding stages with symmetry',
    railsVolts: [12, -12],
    uses: { D1: 'audio', U1: 'audio' },
    revisions: [
      {
        name: '1.0',
        fileName: 'wave-folder.csv',
        freeze: true,
        list: `References,Count,Part,Details
"R1-R12",12,10k,1%
"R13-R18",6,33k,1%
R19,1,470R,1%
"C1-C4",4,100n,X7R 50V
"C5,C6",2,10u 25V,el.
"D1-D12",12,1N4148,
"U1-U3",3,TL072CP,DIP-8
"RV1,RV2",2,B100k lin,9 mm
"J1-J3",3,Jack 3.5 mm mono switched,
PCB1,1,Wave folder board,
`,
      },
    ],
  },
  {
    name: 'Supply ±12 V',
    description: 'Linear supply with mains inlet. Mains work: local electrical code, licensed person',
    railsVolts: [12, -12],
    uses: { C1: 'safety', F1: 'safety', T1: 'safety', C2: 'power', C3: 'power', U1: 'power', U2: 'power' },
    revisions: [
      {
        name: 'A',
        fileName: 'supply.csv',
        freeze: true,
        list: `Reference,Quantity,Value,Remarks
J1,1,Mains inlet IEC C14 with fuse holder,
F1,1,Fuse 500 mA slow 5x20,IEC 60127
C1,1,100n X2 275V polypropylene,X2 safety capacitor
TF1,1,Mains transformer 2x15V 15VA,
"D1-D4",4,1N4007,
"C2,C3",2,2200u 25V,electrolytic
"C4-C7",4,100n,X7R 50V
"C8,C9",2,100u 25V,electrolytic
U1,1,LM7812CT,TO-220
U2,1,LM7912CT,TO-220
J2,1,Screw terminal 3 way 5.08 mm,
PCB1,1,Supply board,
`,
      },
    ],
  },
];
