/**
 * Words that say what a part is, how it is made, cased and mounted, in the languages parts lists come in (English, German,
 * French, Spanish, Italian, Dutch). Common practice throughout, except where a standard is named. Texts are matched after
 * `withoutMarks`, so the patterns are plain ASCII.
 */
import type { Dielectric, Mounting, PartKind, ResistorTechnology } from './part-spec';

type Words<T> = readonly (readonly [RegExp, T])[];

/** Drops accents and umlaut dots, since JavaScript's word boundary knows only ASCII: `électrolytique` → `electrolytique`. */
export function withoutMarks(text: string): string {
  return text
    .normalize('NFD')
    .replace(/[\u0300-\u036f]/g, '')
    .normalize('NFC');
}

export function firstOf<T>(words: Words<T>, text: string): T | null {
  return words.find(([pattern]) => pattern.test(text))?.[1] ?? null;
}

/** Ceramic codes are EIA-198's; film codes are the European makers' (MKS is a polyester series at its best-known maker). */
export const DIELECTRIC_WORDS: Words<Dielectric> = [
  [/\b(?:C0G|COG|NP0|NPO)\b/i, 'C0G'],
  [/\bX5R\b/i, 'X5R'],
  [/\bX6S\b/i, 'X6S'],
  [/\bX7R\b/i, 'X7R'],
  [/\bX7S\b/i, 'X7S'],
  [/\bX8R\b/i, 'X8R'],
  [/\bY5V\b/i, 'Y5V'],
  [/\bY5U\b/i, 'Y5U'],
  [/\bZ5U\b/i, 'Z5U'],
  [
    /\b(?:poly[- ]?styren\w*|polystyrol|poliestireno|polistirene|polistirolo|styroflex|styrofoil|styrol|KS)\b/i,
    'polystyrene',
  ],
  [/\b(?:poly[- ]?prop\w*|poliprop\w*|MKP\d*|FKP\d*|KP|PP)\b/i, 'polypropylene'],
  [/\b(?:poly[- ]?carbonat\w*|policarbonato|MKC\d*|FKC\d*)\b/i, 'polycarbonate'],
  [/\b(?:poly[- ]?ester\w*|mylar|poliester\w*|MKT\d*|MKS\d*|FKS\d*|KT|PET|green ?caps?)\b/i, 'polyester'],
  [/\b(?:silver(?:ed)?[- ]mica|mica|glimmer)\b/i, 'mica'],
  [/\b(?:tant(?:al\w*|aal\w*)?)\b/i, 'tantalum'],
  [
    /\b(?:bi[- ]?polar\w*|non[- ]?polar\w*|un(?:ge)?pol\w*|(?:NP|BP)[- ]?(?:electro\w*|elko|elco))\b/i,
    'aluminium-bipolar',
  ],
  [/\b(?:polymer|OS-?CON)\b/i, 'polymer'],
  [/\b(?:electro(?:l\w*)?|elektrol\w*|elettrol\w*|elko|elco|chimique|alu(?:mini?um)?|lytic|ecap)\b/i, 'aluminium'],
  [/(?:\b(?:films?|foil|pelicula|pellicola|plastique|box film|MKI|MKN)\b|folien?(?:kond\w*)?\b)/i, 'film'],
  [/\b(?:ceram\w*|keram\w*|cer|kerko|MLCC|monolithic)\b/i, 'ceramic'],
];

export const TECHNOLOGY_WORDS: Words<ResistorTechnology> = [
  [/\bmetal[- ]?oxide?\b|\bmetalloxid\w*|\bMOX\b/i, 'metal-oxide'],
  [
    /\bmeta(?:l|ll|al)[- ]?(?:film\w*|schicht\w*)|\bMFR?\b|\bcouche metal\w*|\bpelicula metalica\b|\bstrato metallico\b/i,
    'metal-film',
  ],
  [/\bcarbon[- ]?comp\w*|\bkohlemasse\w*/i, 'carbon-composition'],
  [/\bcarbon(?:[- ]?film)?\b|\bCFR?\b|\bkohleschicht\w*|\bkoolfilm\w*|\bcouche carbone\b/i, 'carbon-film'],
  [/\bwire[- ]?wound\b|\bdraht\w*|\bcement\b|\bbobine\b|\bfilo avvolto\b/i, 'wirewound'],
  [/\bthick[- ]?film\b/i, 'thick-film'],
  [/\bthin[- ]?film\b/i, 'thin-film'],
];

/** Cases as the trade writes them, brought to one spelling. */
export const PACKAGE_PATTERNS: readonly (readonly [RegExp, (match: RegExpExecArray) => string, Mounting | null])[] = [
  [/\b(?:[CP]?DIP|DIL)[-_ ]?(4|6|8|14|16|18|20|24|28|40)\b/i, (m) => `DIP-${m[1] ?? ''}`, 'through-hole'],
  [/\b(4|6|8|14|16|18|20|24|28|40)[- ]?(?:[CP]?DIP|DIL)\b/i, (m) => `DIP-${m[1] ?? ''}`, 'through-hole'],
  [
    /\b(SOIC|SO|SOP|SOT|TSSOP|SSOP|MSOP|VSSOP|QFN|DFN|LQFP|TQFP|QFP)[-_ ]?(\d{1,3}(?:-\d{1,2})?)\b/i,
    (m) => `${(m[1] ?? '').toUpperCase().replace('SOIC', 'SO')}-${m[2] ?? ''}`,
    'surface',
  ],
  [/\bTO[-_ ]?(92|220|126|18|39|3|5|247|264)\b/i, (m) => `TO-${m[1] ?? ''}`, 'through-hole'],
  [/\bDO[-_ ]?(35|41|15|201|7|204)\b/i, (m) => `DO-${m[1] ?? ''}`, 'through-hole'],
  [
    /\b(SOD|SMA|SMB|SMC|MiniMELF|MELF|D2PAK|DPAK)(?:[-_ ]?(\d{2,3}[A-Z]{0,2}))?\b(?!\s*(?:jack|conn|plug|socket))/,
    (m) => `${m[1] ?? ''}${m[2] ? `-${m[2]}` : ''}`,
    'surface',
  ],
  [
    /(?:^|(?<=[\s_:,;/(RCLD]))(0201|0402|0603|0805|1008|1206|1210|1812|2010|2512)(?=$|[\s_,;)])/,
    (m) => m[1] ?? '',
    'surface',
  ],
  [/\b(0204|0207|0309|0411)\b/, (m) => m[1] ?? '', 'through-hole'],
];

export const MOUNTING_WORDS: Words<Mounting> = [
  [/\b(?:SMD|SMT|CMS|surface[- ]?mount)\b/i, 'surface'],
  [/\b(?:THT|TH|through[- ]?hole|thru[- ]?hole|bedrahtet|radial|axial)\b/i, 'through-hole'],
  [/\bpanel(?:[- ]?mount)?\b/i, 'panel'],
];

/**
 * Words that name a kind, most telling first: a socket for an IC is a connector, a resistor for an LED a resistor. Those
 * that only hint (`timer`, `driver`) are left out.
 */
export const KIND_WORDS: Words<PartKind> = [
  [
    /\b(?:knobs?|screws?|nuts?|washers?|spacers?|stand-?offs?|bolts?|schraube\w*|mutter\w*|abstand\w*|heat ?sinks?|kuhlkorper|knopf\w*|enclosure|brackets?|vis|ecrou|entretoise)\b/i,
    'hardware',
  ],
  [
    /\b(?:fuse|led|battery|lens) ?(?:holders?|clips?|spacers?|bezels?)\b|(?:switch|button|knob|fader|slider|\btact\w*)\b.*\bcaps?\b/i,
    'hardware',
  ],
  [
    /\b(?:jacks?|sockets?|headers?|HDR|(?:sd|card|memory card) holders?|connectors?|buchse\w*|stecker\w*|(?:screw |spring )?terminals?(?: blocks?)?|plugs?|receptacles?|IDC|klemme\w*|conn|fassung|sockel|zoccolo|zocalo|embase|pin strips?|stiftleiste|buchsenleiste|banana)\b/i,
    'connector',
  ],
  [/\b(?:opto[- ]?coup\w*|opto[- ]?isol\w*|opto[- ]?koppler|vactrols?)\b/i, 'optocoupler'],
  [
    /\b(?:trimm?(?:er|pot|potentiometer|poti|mpot)?s?|multi[- ]?turn|presets?|cermet|3296[A-Z]?|3362[A-Z]?|3386[A-Z]?|3006[A-Z]?)\b/i,
    'trimmer',
  ],
  [
    /\b(?:pot(?:s|entiometer\w*|entiometre\w*|enzi?ometro\w*|enciometro\w*|meter\w*|is?)?|sliders?|faders?|RV09|RK09\w*|R(?:D)?901\w*)\b/i,
    'potentiometer',
  ],
  [/\b(?:thermistors?|thermistance|termistor\w*|NTC|PTC|tempco|tempsistors?)\b/i, 'thermistor'],
  [
    /\b(?:resistors?|widerst\w*|weerstand\w*|resistances?|resistenz\w*|resistencia\w*|resistor network|res)\b/i,
    'resistor',
  ],
  [/\b(?:capacitors?|\w*kondensator\w*|condensat\w*|condensador\w*|caps?|elkos?|elcos?)\b/i, 'capacitor'],
  [
    /\b(?:inductors?|coils?|chokes?|drossel\w*|spule\w*|ferrites?|beads?|inductances?|induttanza|bobina|spoel)\b/i,
    'inductor',
  ],
  [/\bLED (?:driver|controller)s?\b/i, 'ic'],
  [/\b(?:LEDs?|leuchtdiode\w*)\b/i, 'led'],
  [/\b(?:diodes?|dioden|diodo|diodi|zeners?|schottky|rectifiers?|gleichrichter)\b/i, 'diode'],
  [/\b(?:regulators?|spannungsregler|LDO|regulateur|regolatore)\b/i, 'regulator'],
  [/\b(?:transistors?|transistoren|BJT|JFETs?|MOSFETs?|NPN|PNP|FET)\b/i, 'transistor'],
  [
    /\b(?:op[- ]?amps?|comparators?|schmitt|NAND|NOR|inverters?|flip[- ]?flops?|multiplexers?|timer IC|integrated circuits?|microcontrollers?|OTA|ICs?)\b/i,
    'ic',
  ],
  [/\b(?:crystals?|quartz|quarz|resonators?|xtal)\b/i, 'crystal'],
  [/\b(?:fuses?|sicherung|fusible|polyfuse|zekering|fusibile)\b/i, 'fuse'],
  [/\b(?:transformers?|trafo|transformator|transformateur)\b/i, 'transformer'],
  [
    /\b(?:switch(?:es)?|\w*schalter|taster|buttons?|toggle|SP[SD]T|DP[SD]T|encoders?|interrupteur|schakelaar|interruttore)\b/i,
    'switch',
  ],
  [/\bPCBs?\b|\b(?:platine|leiterplatte|circuit board)\b/i, 'pcb'],
];

/** Anywhere in a text. The short forms in capitals only, and never behind a number, where NF is nanofarad. */
export const NOT_FITTED =
  /(?:^|(?<=[\s([,;:/*-]))(?:DN[PFIS]|not (?:fitted|populated|placed|installed|mounted|used)|do not (?:populate|fit|place|install|stuff|mount)|don'?t (?:populate|fit|place|install)|no[- ](?:pop|stuff|fit|place)|un(?:populated|fitted)|omit(?:ted)?|leave (?:out|empty|open|off)|nicht best(?:u|ue)ck(?:en|t)|unbest(?:u|ue)ckt|entfallt|ne pas (?:monter|poser|souder)|non (?:monte|montare|montato)|no (?:montar|poner)|niet (?:plaatsen|monteren|gemonteerd))(?=$|[\s)\],;:/.*-])/i;

/** The whole text says that nothing goes in. */
export const NOT_FITTED_ALONE =
  /^[\s([]*(?:n\/?a|n\.a\.|nc|n\.c\.|nf|n\.f\.|np|none|empty|leer|keine?|blank|-+|x{2,})[\s)\]]*$/i;

export const OPTIONAL =
  /(?:^|(?<=[\s([,;:/-]))(?:optional(?:ly)?|opt\.|facultatif|opcional|opzionale|optioneel)(?=$|[\s)\],;:/.*-])/i;

export const LEFT_OPEN = /^\?+$|\d\S*\s?\?+$|\b(?:tbd|t\.b\.d\.|select on test|to taste|nach bedarf)\b/i;

/** Sends the reader elsewhere; a question only where the text names no value itself. */
export const ELSEWHERE = /\b(?:see (?:text|notes?|build guide|table)|siehe (?:text|tabelle)|voir (?:texte|notes?))\b/i;
