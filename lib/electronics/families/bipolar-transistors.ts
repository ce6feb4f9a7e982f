/**
 * Bipolar transistors with the order of their leads: flat side towards you, legs down, left to right. Drawings of one
 * number contradict each other between makers now and then, so every order is "check the maker's drawing".
 */
import { noted, pinOut, practice, recalled } from './fact';
import type { BipolarFamily, Fact } from './family';

// id | NPN/PNP | lead order with basis | case | VCEO | IC | gain | flags (D Darlington, P matched pair, L low noise) | groups
const TABLE = `
2n3904 | NPN | E B C p | TO-92 | 40p | 0.2p | 100-300p | |
2n3906 | PNP | E B C p | TO-92 | 40p | 0.2p | 100-300p | |
bc546 | NPN | C B E p | TO-92 | 65d | 0.1d | 110-450d | | A=110-220 B=200-450
bc547 | NPN | C B E p | TO-92 | 45d | 0.1d | 110-800d | | A=110-220 B=200-450 C=420-800
bc548 | NPN | C B E p | TO-92 | 30d | 0.1d | 110-800d | | A=110-220 B=200-450 C=420-800
bc549 | NPN | C B E p | TO-92 | 30d | 0.1d | 200-800d | L | B=200-450 C=420-800
bc550 | NPN | C B E p | TO-92 | 45d | 0.1d | 200-800d | L | B=200-450 C=420-800
bc556 | PNP | C B E p | TO-92 | 65p | 0.1p | 110-450p | | A=110-220 B=200-450
bc557 | PNP | C B E p | TO-92 | 45p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc558 | PNP | C B E p | TO-92 | 30p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc559 | PNP | C B E p | TO-92 | 30p | 0.1p | 200-800p | L | A=110-220 B=200-450 C=420-800
bc560 | PNP | C B E p | TO-92 | 45p | 0.1p | 200-800p | L | A=110-220 B=200-450 C=420-800
2n2222 | NPN | E B C p | TO-18 | 40m | 0.8m | 100-300m | |
pn2222 | NPN | E B C p | TO-92 | 40p | 0.6d | 100-300p | |
p2n2222 | NPN | C B E d | TO-92 | 40p | 0.6p | 100-300p | |
2n2907 | PNP | E B C m | TO-18 | 60m | 0.6m | 100-300m | |
pn2907 | PNP | E B C m | TO-92 | 60m | 0.6m | 100-300m | |
2n4401 | NPN | E B C d | TO-92 | 40m | 0.6m | 100-300m | |
2n4403 | PNP | E B C d | TO-92 | 40m | 0.6m | 100-300m | |
bc337 | NPN | C B E p | TO-92 | 45p | 0.8p | 100-630p | | 16=100-250 25=160-400 40=250-630
bc338 | NPN | C B E p | TO-92 | 25p | 0.8p | 100-630p | | 16=100-250 25=160-400 40=250-630
bc327 | PNP | C B E p | TO-92 | 45p | 0.8p | 100-630p | | 16=100-250 25=160-400 40=250-630
bc328 | PNP | C B E p | TO-92 | 25p | 0.8p | 100-630p | | 16=100-250 25=160-400 40=250-630
bc516 | PNP | C B E p | TO-92 | 30p | 1p | 30000-300000m | D |
bc517 | NPN | C B E p | TO-92 | 30p | 1p | 30000-300000m | D |
bc639 | NPN | E C B m | TO-92 | 80m | 1m | 40-250m | |
bc640 | PNP | E C B m | TO-92 | 80m | 1m | 40-250m | |
mpsa06 | NPN | E B C m | TO-92 | 80m | 0.5m | 100-400m | |
mpsa56 | PNP | E B C m | TO-92 | 80m | 0.5m | 100-400m | |
mpsa13 | NPN | E B C m | TO-92 | 30m | 0.5m | 5000-100000m | D |
mpsa14 | NPN | E B C m | TO-92 | 30m | 0.5m | 10000-100000m | D |
mpsa18 | NPN | E B C m | TO-92 | 45m | 0.2m | 500-1500m | L |
mpsa42 | NPN | E B C p | TO-92 | 300p | 0.5p | 40-200m | |
mpsa92 | PNP | E B C p | TO-92 | 300p | 0.5p | 40-200m | |
2sc945 | NPN | E C B m | TO-92 | 50m | 0.1m | 90-600m | | R=90-180 Q=135-270 P=200-400 K=300-600
2sa733 | PNP | E C B m | TO-92 | 50m | 0.1m | 90-600m | | R=90-180 Q=135-270 P=200-400 K=300-600
2sc1815 | NPN | E C B p | TO-92 | 50p | 0.15p | 70-700p | | O=70-140 Y=120-240 GR=200-400 BL=350-700
2sa1015 | PNP | E C B p | TO-92 | 50p | 0.15p | 70-400p | | O=70-140 Y=120-240 GR=200-400
2sc2240 | NPN | E C B m | TO-92 | 120m | 0.1m | 200-700m | L | GR=200-400 BL=350-700
2sa970 | PNP | E C B m | TO-92 | 120m | 0.1m | 200-700m | L | GR=200-400 BL=350-700
2n5087 | PNP | E B C m | TO-92 | 50m | 0.05m | 250-800m | L |
2n5088 | NPN | E B C m | TO-92 | 30m | 0.05m | 300-900m | L |
2n5089 | NPN | E B C m | TO-92 | 25m | 0.05m | 400-1200m | L |
2n5401 | PNP | E B C m | TO-92 | 150m | 0.6m | 60-240m | |
2n5551 | NPN | E B C m | TO-92 | 160m | 0.6m | 80-250m | |
s8050 | NPN | E B C p | TO-92 | 20p | 0.7p | 85-300m | | C=120-200 D=160-300
s8550 | PNP | E B C p | TO-92 | 20p | 0.7p | 85-300m | | C=120-200 D=160-300
bc107 | NPN | E B C p | TO-18 | 45p | 0.1p | 110-450m | | A=110-220 B=200-450
bc108 | NPN | E B C p | TO-18 | 25p | 0.1p | 110-800m | | A=110-220 B=200-450 C=420-800
bc109 | NPN | E B C p | TO-18 | 25p | 0.1p | 200-800m | L | B=200-450 C=420-800
bc237 | NPN | C B E p | TO-92 | 45p | 0.1p | 110-800m | | A=110-220 B=200-450 C=420-800
bc307 | PNP | C B E p | TO-92 | 45p | 0.1p | 110-800m | | A=110-220 B=200-450 C=420-800
bc413 | NPN | C B E p | TO-92 | 30p | 0.1p | 200-800m | L | B=200-450 C=420-800
bc414 | NPN | C B E p | TO-92 | 45p | 0.1p | 200-800m | L | B=200-450 C=420-800
2n2219 | NPN | E B C p | TO-39 | 40m | 0.8m | 100-300m | |
2n3053 | NPN | E B C m | TO-39 | 40m | 0.7m | 50-250m | |
2n3055 | NPN | B E C p | TO-3 | 60p | 15p | 20-70p | |
mj2955 | PNP | B E C p | TO-3 | 60p | 15p | 20-70p | |
bd135 | NPN | E C B p | TO-126 | 45p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
bd136 | PNP | E C B p | TO-126 | 45p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
bd137 | NPN | E C B p | TO-126 | 60p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
bd138 | PNP | E C B p | TO-126 | 60p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
bd139 | NPN | E C B p | TO-126 | 80p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
bd140 | PNP | E C B p | TO-126 | 80p | 1.5p | 40-250p | | 6=40-100 10=63-160 16=100-250
tip31 | NPN | B C E m | TO-220 | 40m | 3m | 10-50m | |
tip32 | PNP | B C E m | TO-220 | 40m | 3m | 10-50m | |
tip41 | NPN | B C E p | TO-220 | 40p | 6p | 15-75m | |
tip42 | PNP | B C E p | TO-220 | 40p | 6p | 15-75m | |
tip120 | NPN | B C E p | TO-220 | 60p | 5p | 1000-20000m | D |
tip121 | NPN | B C E p | TO-220 | 80p | 5p | 1000-20000m | D |
tip122 | NPN | B C E p | TO-220 | 100p | 5p | 1000-20000m | D |
tip125 | PNP | B C E p | TO-220 | 60p | 5p | 1000-20000m | D |
tip126 | PNP | B C E p | TO-220 | 80p | 5p | 1000-20000m | D |
tip127 | PNP | B C E p | TO-220 | 100p | 5p | 1000-20000m | D |
tip2955 | PNP | B C E p | TO-247 | 60p | 15p | 20-70m | |
tip3055 | NPN | B C E p | TO-247 | 60p | 15p | 20-70m | |
bc817 | NPN | B E C p | SOT-23 | 45p | 0.8p | 100-600m | | 16=100-250 25=160-400 40=250-600
bc807 | PNP | B E C p | SOT-23 | 45p | 0.8p | 100-600m | | 16=100-250 25=160-400 40=250-600
bc846 | NPN | B E C p | SOT-23 | 65p | 0.1p | 110-450p | | A=110-220 B=200-450
bc847 | NPN | B E C p | SOT-23 | 45p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc848 | NPN | B E C p | SOT-23 | 30p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc849 | NPN | B E C p | SOT-23 | 30p | 0.1p | 200-800p | L | B=200-450 C=420-800
bc850 | NPN | B E C p | SOT-23 | 45p | 0.1p | 200-800p | L | B=200-450 C=420-800
bc856 | PNP | B E C p | SOT-23 | 65p | 0.1p | 110-450p | | A=110-220 B=200-450
bc857 | PNP | B E C p | SOT-23 | 45p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc858 | PNP | B E C p | SOT-23 | 30p | 0.1p | 110-800p | | A=110-220 B=200-450 C=420-800
bc859 | PNP | B E C p | SOT-23 | 30p | 0.1p | 200-800p | L | B=200-450 C=420-800
bc860 | PNP | B E C p | SOT-23 | 45p | 0.1p | 200-800p | L | B=200-450 C=420-800
mmbt3904 | NPN | B E C p | SOT-23 | 40p | 0.2p | 100-300p | |
mmbt3906 | PNP | B E C p | SOT-23 | 40p | 0.2p | 100-300p | |
mmbt2222 | NPN | B E C m | SOT-23 | 40m | 0.6m | 100-300m | |
ssm2210 | NPN | C1 B1 E1 NC NC E2 B2 C2 p | DIP-8 | 40m | 0.02m | 300-1000m | PL |
ssm2220 | PNP | C1 B1 E1 NC NC E2 B2 C2 p | DIP-8 | 36m | 0.02m | 80-300m | PL |
mat02 | NPN | C1 B1 E1 E2 B2 C2 p | TO-78 | 40m | 0.02m | 300-1000m | PL |
mat12 | NPN | C1 B1 E1 E2 B2 C2 m | TO-78 | 40m | 0.02m | 300-1000m | PL |
mat14 | NPN | - | DIP-14 | 40m | 0.03m | 300-1000m | PL |
lm394 | NPN | C1 B1 E1 E2 B2 C2 m | TO-78 | 20m | 0.02m | 300-1000m | PL |
dmmt3904 | NPN | - | SOT-26 | 40m | 0.2m | 100-300m | P |
dmmt3906 | PNP | - | SOT-26 | 40m | 0.2m | 100-300m | P |
bcm847 | NPN | - | SOT-457 | 45m | 0.1m | 200-450m | P |
bcm857 | PNP | - | SOT-457 | 45m | 0.1m | 200-450m | P |
bcv61 | NPN | C2 C1 E1 E2 p | SOT-143 | 30m | 0.1m | 110-800m | P | A=110-220 B=200-450 C=420-800
bcv62 | PNP | C2 C1 E1 E2 p | SOT-143 | 30m | 0.1m | 110-800m | P | A=125-250 B=220-475 C=420-800
`;

const K = 'KiCad 6 symbol or a read datasheet, with makers’ sheets recalled';
const DRAWING = practice(
  'Check the maker’s drawing or measure: sheets of one number have been seen with the leads reversed.',
  'two contradicting datasheets of the BC547',
);
const HOUSE_PREFIX = practice(
  'The P2N2222A has collector and emitter the other way round from the PN2222A.',
  'onsemi P2N2222A datasheet',
);

function range(text: string): readonly [number, number] {
  const [low = '', high = ''] = text.split('-');
  return [Number(low), Number(high)];
}

function readRow(line: string): BipolarFamily {
  const [
    id = '',
    polarity = '',
    leads = '',
    packageName = '',
    volts = '-',
    amperes = '-',
    gain = '',
    flags = '',
    groups = '',
  ] = line.split('|').map((cell) => cell.trim());
  if (polarity !== 'NPN' && polarity !== 'PNP')
    throw new RangeError(`The transistor table holds the polarity "${polarity}".`);
  const basis = leads.slice(-1);
  const order = pinOut(leads.slice(0, -2), packageName);
  const gainFact: Fact<readonly [number, number]> = gain.endsWith('m')
    ? recalled(range(gain.slice(0, -1)))
    : practice(range(gain.slice(0, -1)), K);
  const [darlington, pair, lowNoise] = [flags.includes('D'), flags.includes('P'), flags.includes('L')];
  return {
    id,
    kind: 'transistor',
    group: 'bipolar',
    title: `${polarity}${darlington ? ' Darlington' : ''}${pair ? ' matched pair' : ''}${lowNoise ? ', low noise' : ''}, ${packageName}`,
    units: pair ? 2 : 1,
    pinOut: leads === '-' ? null : basis === 'm' ? recalled(order) : practice(order, K),
    polarity,
    darlington,
    matchedPair: pair,
    collectorEmitterVolts: noted(volts, K),
    collectorAmperes: noted(amperes, K),
    gain: gainFact,
    gainGroups: Object.fromEntries(
      groups
        .split(' ')
        .filter((group) => group !== '')
        .map((group) => {
          const [letter = '', span = ''] = group.split('=');
          return [letter, range(span)];
        }),
    ),
    lowNoise,
    cautions: /2222/.test(id) ? [DRAWING, HOUSE_PREFIX] : packageName === 'TO-92' ? [DRAWING] : [],
  };
}

export const BIPOLAR_FAMILIES: readonly BipolarFamily[] = TABLE.trim().split('\n').map(readRow);
