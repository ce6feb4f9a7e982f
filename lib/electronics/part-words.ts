/** Words that say how a part is made, cased and mounted, in the languages parts lists come in. Common practice throughout. */
import type { Dielectric, Mounting, PartKind, ResistorTechnology } from './part-spec';

type Words<T> = readonly (readonly [RegExp, T])[];

export const DIELECTRIC_WORDS: Words<Dielectric> = [
  [/\b(?:C0G|COG|NP0|NPO|CH)\b/i, 'C0G'],
  [/\bX5R\b/i, 'X5R'],
  [/\bX6S\b/i, 'X6S'],
  [/\bX7R\b/i, 'X7R'],
  [/\bX7S\b/i, 'X7S'],
  [/\bX8R\b/i, 'X8R'],
  [/\bY5V\b/i, 'Y5V'],
  [/\bY5U\b/i, 'Y5U'],
  [/\bZ5U\b/i, 'Z5U'],
  [/\b(?:polystyrene|styroflex|styrol|KS\d*)\b/i, 'polystyrene'],
  [
    /\b(?:polypropylene|polypropyleen|polypropylène|polipropileno|polipropilene|MKP\d*|FKP\d*|KP|PP)\b/i,
    'polypropylene',
  ],
  [/\b(?:polycarbonate|MKC|FKC)\b/i, 'polycarbonate'],
  [/\b(?:polyester|mylar|poliéster|poliestere|MKT\d*|MKS\d*|FKS\d*|KT|PET|greencap)\b/i, 'polyester'],
  [/\b(?:film|folie\w*|foil|película|pellicola|box)\b/i, 'film'],
  [/\b(?:silver[- ]mica|mica|glimmer)\b/i, 'mica'],
  [/\b(?:tantalum|tantal\w*|tantale|tántalo|tantalio|tant)\b/i, 'tantalum'],
  [
    /\b(?:bipolar\s+(?:electro\w*|elko|cap\w*)|non[- ]?polar\w*|bi[- ]?polar|NP electro\w*|BP electro\w*)\b/i,
    'aluminium-bipolar',
  ],
  [/\b(?:polymer)\b/i, 'polymer'],
  [
    /\b(?:electro\w*|elektrolyt\w*|elko|elco|él?ectrolytique|chimique|electrol[ií]tico|elettrolitico|alu(?:mini?um)?|el\.|lytic)(?=$|\W)/i,
    'aluminium',
  ],
  [
    /\b(?:ceramic|ceram|keramik\w*|keramisch\w*|céramique|cer[aá]mico|ceramico|cer|kerko|disc|MLCC|mono(?:lithic)?)\b/i,
    'ceramic',
  ],
];

export const TECHNOLOGY_WORDS: Words<ResistorTechnology> = [
  [/\bmetal[- ]?oxide\b|\bMOX?\b/i, 'metal-oxide'],
  [/\bmetal(?:l)?[- ]?(?:film|schicht)\b|\bMF\b|\bmetaalfilm\b|\bcouche métal\w*/i, 'metal-film'],
  [/\bcarbon[- ]?comp\w*/i, 'carbon-composition'],
  [/\bcarbon(?:[- ]?film)?\b|\bCF\b|\bkohleschicht\b|\bkoolfilm\b/i, 'carbon-film'],
  [/\bwire[- ]?wound\b|\bdraht\w*|\bcement\b/i, 'wirewound'],
  [/\bthick[- ]?film\b/i, 'thick-film'],
  [/\bthin[- ]?film\b/i, 'thin-film'],
];

/** Cases as the trade writes them, brought to one spelling. */
export const PACKAGE_PATTERNS: readonly (readonly [RegExp, (match: RegExpExecArray) => string, Mounting | null])[] = [
  [/\b(?:C?P?DIP|DIL|PDIP)[-_ ]?(4|6|8|14|16|18|20|24|28|40)\b/i, (m) => `DIP-${m[1]}`, 'through-hole'],
  [
    /\b(SOIC|SO|SOP|SOT|TSSOP|SSOP|MSOP|VSSOP|QFN|DFN|LQFP|TQFP|QFP)[-_ ]?(\d{1,3}(?:-\d{1,2})?)\b/i,
    (m) => `${(m[1] ?? '').toUpperCase().replace('SOIC', 'SO')}-${m[2]}`,
    'surface',
  ],
  [/\bTO[-_ ]?(92|220|126|18|39|3|5|247|264)\b/i, (m) => `TO-${m[1]}`, 'through-hole'],
  [/\b(?:DO[-_ ]?(35|41|15|201|7|204))\b/i, (m) => `DO-${m[1]}`, 'through-hole'],
  [
    /\b(SOD|SMA|SMB|SMC|MELF|MiniMELF|DPAK|D2PAK)[-_ ]?(\d{2,3}[A-Z]{0,2})?\b/,
    (m) => `${m[1]}${m[2] ? `-${m[2]}` : ''}`,
    'surface',
  ],
  [/(?:^|[\s_:RCLD])(0201|0402|0603|0805|1008|1206|1210|1812|2010|2512)(?=$|[\s_,;])/, (m) => m[1] ?? '', 'surface'],
  [/\b(0204|0207|0309|0411)\b/, (m) => m[1] ?? '', 'through-hole'],
];

export const MOUNTING_WORDS: Words<Mounting> = [
  [/\b(?:SMD|SMT|surface[- ]?mount)\b/i, 'surface'],
  [/\b(?:THT|TH|through[- ]?hole|thru[- ]?hole|radial|axial)\b/i, 'through-hole'],
  [/\bpanel(?:[- ]?mount)?\b/i, 'panel'],
];

/** Words that name a kind, most telling first. */
export const KIND_WORDS: Words<PartKind> = [
  [/\b(?:opto[- ]?coupler\w*|opto[- ]?isolator\w*|optokoppler|vactrol)\b/i, 'optocoupler'],
  [/\b(?:trim(?:mer|pot|mpot)?\w*|multi[- ]?turn|preset|cermet)\b/i, 'trimmer'],
  [/\b(?:pot(?:s|entiometer\w*|enzi[oó]metro\w*|entiomètre\w*)?|poti|potmeter|slider|fader)\b/i, 'potentiometer'],
  [/\b(?:thermistor\w*|NTC|PTC|tempco|tempsistor\w*)\b/i, 'thermistor'],
  [/\bLEDs?\b|\bleuchtdiode/i, 'led'],
  [/\b(?:diodes?|dioden?|diodo|diodi|zener|schottky|rectifier|gleichrichter)\b/i, 'diode'],
  [/\b(?:voltage regulator|regulator\w*|spannungsregler|LDO|régulateur)\b/i, 'regulator'],
  [/\b(?:transistor\w*|BJT|JFET|MOSFET|NPN|PNP|FET)\b/i, 'transistor'],
  [
    /\b(?:op[- ]?amps?|comparator|schmitt|NAND|NOR gate|inverter|flip[- ]?flop|multiplexer|timer IC|integrated circuit|microcontroller|OTA|ICs?)\b/i,
    'ic',
  ],
  [/\b(?:crystal|quartz|quarz|resonator|oscillator|xtal)\b/i, 'crystal'],
  [/\b(?:fuse|sicherung|fusible|polyfuse|zekering|fusibile)\b(?!\s*holder)/i, 'fuse'],
  [/\b(?:transformer|trafo|transformator|transformateur)\b/i, 'transformer'],
  [/\b(?:capacitor\w*|kondensator\w*|condensat\w*|condensador\w*|caps?|elko|elco)\b/i, 'capacitor'],
  [/\b(?:resistor\w*|widerst\w*|weerstand\w*|résistance\w*|resisten\w*|res)\b/i, 'resistor'],
  [/\b(?:inductor\w*|coil|choke|drossel|spule|ferrite bead|ferrite|inductance|induttanza)\b/i, 'inductor'],
  [
    /\b(?:jack|socket|header|connector|buchse|stecker|terminal|plug|receptacle|IDC|klemme|conn|pin strip|banana)\w*\b/i,
    'connector',
  ],
  [/\b(?:switch|schalter|taster|button|toggle|SPDT|DPDT|SPST|encoder|interrupteur|schakelaar)\w*\b/i, 'switch'],
  [
    /\b(?:knob|screw|nut|washer|spacer|standoff|stand-off|bolt|schraube|mutter|heat ?sink|knopf|enclosure|fuse ?holder|led ?holder|bracket)s?\b/i,
    'hardware',
  ],
];

export const NOT_FITTED =
  /(?:^|[\s([,;/-])(?:DNP|DNF|DNI|NC|N\.?F\.?|not fitted|not populated|do not (?:populate|fit|place|install|stuff)|no (?:pop|stuff|fit)|unpopulated|omit(?:ted)?|leave (?:out|empty)|nicht best(?:ü|ue)cken|unbest(?:ü|ue)ckt|ne pas (?:monter|poser)|no montar|niet (?:plaatsen|monteren)|non montare)(?=$|[\s)\],;/.-])/i;

export function firstOf<T>(words: Words<T>, text: string): T | null {
  return words.find(([pattern]) => pattern.test(text))?.[1] ?? null;
}
