/**
 * Part numbers as makers and builders write them. The spellings are the public ordering codes of TI, ST, onsemi,
 * Nexperia, Microchip, JRC and others, from memory of their catalogues; what each names is the trade's common knowledge.
 */
import { describe, expect, it } from 'vitest';
import { familyOf } from '@/lib/electronics/families/family-of';
import { findFamily, listFamilies } from '@/lib/electronics/families/find-family';
import { SPELLINGS } from '@/lib/electronics/families/spellings';

const READS: Readonly<Record<string, string>> = {
  '4093':
    'CD4093BE|HEF4093BP|HCF4093|MC14093BCP|4093|CD4093BCN|HCF4093BEY|HEF4093BT,653|CD4093BM96|TC4093BP|HEF4093BT|MC14093BDR2G|CD4093|cd4093be|CD 4093 BE|HCF4093BM1|NLV14093BDG|4093B',
  '4011': 'CD4011BE|HEF4011BP|MC14011BCP|4011|CD4011UBE|HCF4011BE|4011B',
  '4001': 'CD4001BE|MC14001BCP|4001',
  '4069': 'CD4069UBE|MC14069UBCP|HEF4069UBP|4069UB|CD4069UBM',
  '4049': 'CD4049UBE|4049UB|HEF4049BP|MC14049UBCP|CD4049UBEE4|HCF4049UBEY',
  '4050': 'CD4050BE|HEF4050BP|CD4050BM96',
  '40106': 'CD40106BE|HEF40106BP|40106|MC14106BCP|HCF40106BE|CD40106BM|TC40106',
  '4584': 'MC14584BCP|HEF4584|4584',
  '4066': 'CD4066BE|HEF4066BP|4066|MC14066BCP|HCF4066BE|4066B',
  '4016': 'CD4016BE|HEF4016BP',
  '4051': 'CD4051BE|HEF4051BT|MC14051BDR2G|4051BE',
  '4052': 'CD4052BE|HCF4052BE',
  '4053': 'CD4053BE|MC14053BCPG',
  '4013': 'CD4013BE|4013|HEF4013BP|CD4013BCN',
  '4017': 'CD4017BE|HEF4017BP|CD4017BEE4',
  '4040': 'CD4040BE|4040',
  '4046': 'CD4046BE|HEF4046BP|MC14046BCP',
  '4538': 'MC14538BCP|HEF4538BT',
  '74hc4051': '74HC4051PW,118|74HC4051N|CD74HC4051E|SN74HC4051D|MC74HC4051ADG|74hc4051',
  '74hc14': '74HC14|SN74HC14N|MC74HC14AN|74HC14D,653|CD74HC14E',
  '74hct00': '74HCT00N|SN74HCT00N',
  '74hc00': '74HC00|SN74HC00N|74HC00N,652',
  '74ls132': '74LS132|SN74LS132N',
  '7400': 'SN7400N|7400|5400',
  '74hc595': '74HC595|SN74HC595N|74HC595D',
  '74hcu04': '74HCU04|SN74HCU04N',
  '74hc4316': '74HC4316N',
  tl072: 'TL072CP|TL072CDT|TL072|TL072CN|TL072IP|TL072ACP|TL072BCP|TL072CDR|TL072CPE4|TL072 CP|TL072HIDR',
  tl074: 'TL074CN|TL074|TL074CDR',
  tl071: 'TL071CP|TL071',
  tl062: 'TL062CP|TL062CD',
  tl082: 'TL082CP|TL082CN',
  tl084: 'TL084CN',
  tlc072: 'TLC072|TLC072CP|TLC072IDGN',
  tlc272: 'TLC272CP|TLC272',
  tlc2272: 'TLC2272CP|TLC2272',
  '4558': 'NJM4558D|4558N|RC4558P|JRC4558D|RC4558|4558|MC4558CN|4558D|BA4558',
  '4580': 'NJM4580D|NJM4580|4580',
  ne5532: 'NE5532P|NE5532|SA5532|NJM5532D|5532|NE5532AP|NE5532ADR|NE5532N',
  ne5534: 'NE5534P|NE5534AN|SA5534AN',
  lm358: 'LM358|LM358N|LM358P|LM358DR|LM258|LM358 N|LM358A',
  lm324: 'LM324|LM324N|LM324AN|LM224',
  lm741: 'LM741CN|UA741CP|741|741CN',
  lf353: 'LF353N|LF353',
  lf412: 'LF412CN|LF412ACN',
  lm833: 'LM833N|LM833P',
  opa2134: 'OPA2134PA|OPA2134UA|OPA2134',
  opa134: 'OPA134PA|OPA134',
  op07: 'OP07CP|OP07DP',
  op27: 'OP27GP|OP27GPZ',
  op275: 'OP275GP|OP275',
  mcp6002: 'MCP6002-I/P|MCP6002|MCP6002T-I/SN',
  mcp6004: 'MCP6004T-I/ST|MCP6004-I/P',
  mcp602: 'MCP602-I/P|MCP602',
  mcp6022: 'MCP6022-I/P',
  lmc6482: 'LMC6482IN|LMC6482AIMX/NOPB',
  lm13700: 'LM13700N|LM13700|LM13700M/NOPB|NJM13700D|V13700|13700',
  lm13600: 'LM13600N',
  ca3080: 'CA3080E|CA3080AE|CA3080',
  lm311: 'LM311P|LM311N',
  lm339: 'LM339N|LM339',
  lm393: 'LM393P|LM393N|LM293',
  ne555: '555|555N|NE555P|NE555N|NE555|LM555CN|SA555|NE555DR|NA555',
  icm7555: 'ICM7555IPA|ICM7555|7555',
  tlc555: 'TLC555CP|TLC555',
  ne556: 'NE556N|LM556CN|556',
  as3340: 'CEM3340|AS3340|V3340|3340',
  as3320: 'AS3320|CEM3320|V3320',
  ssi2164: 'SSM2164P|SSI2164|V2164',
  pt2399: 'PT2399',
  mn3007: 'MN3007|BL3007',
  tl431: 'TL431ACLP|TL431|LM431ACZ',
  '7805': 'LM7805CT|L7805CV|7805|UA7805|LM7805|MC7805CTG|LM340T-5|LM340T-5.0',
  '7812': 'L7812CV|LM7812|7812CT',
  '7905': 'L7905CV|LM7905CT|MC7905',
  '7912': 'LM7912CT|7912',
  '78l05': '78L05|LM78L05ACZ|L78L05ABZ|MC78L05ACP|UA78L05CLP',
  '79l05': '79L05|LM79L05ACZ|MC79L05ACP',
  '78m05': '78M05|MC78M05CTG',
  lm317: 'LM317T|LM317|LM317EMP|LM317TG',
  lm317l: 'LM317LZ|LM317L|LM317LIPK',
  lm337: 'LM337T|LM337',
  'lm1117-3.3': 'LM1117-3.3|LM1117T-3.3/NOPB|AMS1117-3.3|LD1117V33|LM1117MPX-3.3|AMS1117 3.3',
  'lm1117-5': 'LM1117-5.0|LD1117V50|LM1117T-5.0',
  'lm1117-adj': 'LM1117-ADJ|LM1117T-ADJ',
  'lm2940-5': 'LM2940CT-5.0|LM2940T-5.0',
  'lm4040-10': 'LM4040CIM3-10.0|LM4040DIZ-10.0|LM4040-10',
  'lm4040-5': 'LM4040DIZ-5.0|LM4040AIZ-5.0',
  'lm4040-2.5': 'LM4040AIM3-2.5',
  'lm4040-4.1': 'LM4040DIZ-4.1',
  'lm385-1.2': 'LM385Z-1.2',
  'mcp1700-3.3': 'MCP1700-3302E/TO|MCP1700-3302E',
  bc547: 'BC547B|BC547|BC547C|BC 547 B|BC547BTA|BC547-B|BC547A',
  bc557: 'BC557B|BC557',
  bc337: 'BC337-25|BC337|BC337-40',
  bc847: 'BC847B|BC847BLT1G|BC847C,215',
  '2n3904': '2N3904|2N3904BU|2N3904TA|2N 3904',
  '2n3906': '2N3906|2N3906TF',
  '2n2222': '2N2222|2N2222A',
  pn2222: 'PN2222A|PN2222',
  p2n2222: 'P2N2222A|P2N2222AG',
  '2sc1815': '2SC1815GR|2SC1815|C1815|2SC1815-Y|KSC1815GR',
  '2sc945': '2SC945|C945|2SC945P',
  '2sa1015': '2SA1015GR|A1015',
  s8050: 'S8050|SS8050D',
  bd139: 'BD139|BD139-16',
  tip120: 'TIP120|TIP120G',
  mpsa13: 'MPSA13|MPSA13G|KSP13',
  j112: 'J112|J112-D74Z',
  j201: 'J201',
  '2n5457': '2N5457|2N5457G',
  bf245a: 'BF245A',
  bf245c: 'BF245C',
  '2n7000': '2N7000|2N7000-G|2N7000TA',
  '1n4148': '1N4148|1N4148W|1N4148WS|1N4148W-TP|LL4148|1N4148TR|1n4148',
  '1n914': '1N914|1N914B|1N914BTR',
  '1n4001': '1N4001|1N4001G|1N4001-T',
  '1n4007': '1N4007|1N4007-TP|1N4007G',
  '1n5817': '1N5817|1N5817G',
  '1n5819': '1N5819|1N5819HW|SS14',
  bat41: 'BAT41|BAT41-TAP',
  bat54: 'BAT54|BAT54,215',
  bat54s: 'BAT54S|BAT54SLT1G|BAT54S,215',
  '1n34': '1N34A|1N34',
  '1n4733': '1N4733A|1N4733|1N4733A-TR',
  '1n5231': '1N5231B',
  'bzx55-5v1': 'BZX55C5V1|BZX55-C5V1|BZX55C5V1-TR',
  'bzx79-12': 'BZX79-C12|BZX79C12|BZX79-C12,113',
  'bzx85-5v1': 'BZX85C5V1',
  'bzx84-3v3': 'BZX84C3V3|BZX84-C3V3,215',
  '4n35': '4N35|4N35M|4N35-X000',
  '6n137': '6N137|6N137M|6N137-X007T',
  '6n138': '6N138|6N138M',
  pc817: 'PC817|PC817A|EL817|LTV-817|PC817X2NSZ0F',
  vtl5c3: 'VTL5C3',
  'nsl-32': 'NSL-32|NSL32',
  dg412: 'DG412DJ|DG412',
  that2180: 'THAT2180A',
};

describe('a part number of any maker’s usual spelling, grade and package reads to its family', () => {
  const pairs = Object.entries(READS).flatMap(([id, texts]) => texts.split('|').map((text) => [text, id] as const));

  it('holds at least 300 spellings', () => {
    expect(pairs.length).toBeGreaterThanOrEqual(300);
  });

  it.each(pairs)('%s is a %s', (text, id) => {
    expect(familyOf(text)?.familyId ?? null).toBe(id);
  });
});

describe('a value is no part number', () => {
  const values =
    '4700 100n 510 1k 4k7 47k 2n2 104 470n 1000 2200 3300 4u7 10k 4.7k 330p 4700p 4016k 1M5 4R7 R47 .1 0.1uF 100 324 317 393 339 311 10 220R 22p 1N4 2N2 1N5 47 82 33 4N7 6N8 100V 15V 1% 4,7k 22µ 10uF 1H 600Ω 16MHz'.split(
      ' ',
    );
  it.each(values)('%s', (text) => {
    expect(familyOf(text)).toBeNull();
  });

  it.each([
    '',
    '   ',
    '…',
    'resistor',
    'DNP',
    'n/a',
    'A'.repeat(5_000),
    '💡',
    'LM',
    'TL07',
    'TL0720',
    '74HC',
    'CD4999BE',
    'BC',
    '1N',
    '2N390',
    '1N41480',
  ])('nor is %j', (text) => {
    expect(familyOf(text)).toBeNull();
  });
});

describe('the tables of spellings and of facts hold the same families', () => {
  it('every family is read back from its own id, as its own kind', () => {
    const unread = listFamilies().filter((family) => {
      const read = familyOf(family.id);
      return read?.familyId !== family.id || read.kind !== family.kind;
    });
    expect(unread.map(({ id }) => id)).toEqual([]);
  });

  it('every spelling leads to a family with facts', () => {
    expect(SPELLINGS.filter(({ id }) => findFamily(id) === null).map(({ id }) => id)).toEqual([]);
  });

  it('carries at least 220 families besides the Zener ladders, none twice', () => {
    const ids = listFamilies().map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(listFamilies().filter(({ group }) => group !== 'zener').length).toBeGreaterThanOrEqual(220);
  });

  it('finds nothing under an id that is not carried', () => {
    expect(findFamily('no such part')).toBeNull();
  });
});
