/** What headings are called, in six languages, and which role each word points to. Common practice throughout. */

export const COLUMN_ROLES = [
  'designators',
  'quantity',
  'value',
  'kind',
  'description',
  'part-number',
  'maker',
  'package',
  'notes',
  'fitted',
  'order-code',
  'price',
  'index',
  'ignore',
] as const;
export type Role = (typeof COLUMN_ROLES)[number];

const WORDS: readonly (readonly [Role, RegExp])[] = [
  [
    'fitted',
    /^(?:dnp|dnf|dni|fitted|populate[d]?|fit|bestückt|bestueckt|mounted|monté|montado|gemonteerd|do not (?:fit|populate|place))\??$/,
  ],
  ['price', /(?:price|cost|^total(?!\s*q)|preis|kosten|prix|coût|precio|prijs|prezzo|€|\$|\beur\b|\busd\b|€\/)/],
  [
    'order-code',
    /(?:^sku|order (?:code|no|number|nr|#)|bestell|digi-?key|mouser|lcsc|farnell|newark|rs (?:no|part|#)|reichelt|tayda|thonk|supplier|vendor|lieferant|fournisseur|proveedor|leverancier|fornitore|^link|^url|shop|distributor|oc_|catalog|ref\.? mouser|customer reference|jlc|szlcsc)/,
  ],
  [
    'part-number',
    /(?:^mpn$|manufacturer.?s? ?(?:part|p\/n|pn)|mfr\.? ?(?:part|p\/n|pn|#)|mfg\.? ?(?:part|p\/n|pn)|part ?(?:number|no\.?|nr\.?|#)$|^partnumber$|^p\/n$|hersteller-?(?:nr|nummer|teile)|teilenummer|artikelnummer|référence fabricant|número de parte|onderdeelnummer|codice produttore)/,
  ],
  [
    'maker',
    /^(?:manufacturer|mfr|mfg|maker|hersteller|fabricant|fabricante|fabrikant|produttore|brand|marke|marque|marca|merk|mf)\b/,
  ],
  [
    'package',
    /(?:package|footprint|^case\b|gehäuse|gehaeuse|bauform|boîtier|boitier|encapsulado|behuizing|contenitore|^size$|^foot$|packaging)/,
  ],
  [
    'quantity',
    /^(?:qty\.?|qnty|qtt?y\.?|quantity.*|quant\.?|count|menge|anzahl|stück(?:zahl)?|stueck(?:zahl)?|stk\.?|quantité|qté\.?|quantite|cantidad|cant\.?|aantal|quantità|q\.tà|pcs\.?|pieces|amount|no\.? (?:of|off|req).*|number (?:of|off).*|needed|required|#\s*needed)$/,
  ],
  [
    'designators',
    /^(?:ref(?:s|\.|erences?|erence\(s\)|erence designators?|des(?:ignator)?s?)?|designators?|reference.*|bezeichner|referenz(?:en)?|repères?|reperes?|références?|referencias?|designador(?:es)?|riferiment[oi]|referentie[s]?|designazione|refdes|parts|ref-?des|pos\.? ?nr|component id|schematic.*)$/,
  ],
  [
    'value',
    /^(?:values?|val\.?|wert[e]?|valeurs?|valor(?:es)?|waarde|valore|valori|value\s*\/.*|nominal|ohms?|capacitance|resistance)$/,
  ],
  [
    'kind',
    /^(?:types?|typ|category|categories|kind|art|catégorie|categoría|tipo|soort|class|component type|part type|bauteil ?typ|gruppe|group|family)$/,
  ],
  [
    'description',
    /(?:descri(?:ption|pción|zione)|^desc\b|beschreibung|omschrijving|désignation|designation|comment|^name|component|bauteil|composant|componente|onderdeel|^part$|^item name|^device|bezeichnung|libpart|^artikel|combinedname)/,
  ],
  [
    'notes',
    /(?:^notes?$|remark|bemerkung|anmerkung|hinweis|remarque|^notas?$|observa|opmerking|^info|^spec|rating|tolerance|toleranz|voltage|spannung|tension|tensión|detail|extra|watt|power|leistung|^status|^comments$)/,
  ],
  ['index', /^(?:#|item|id|nr\.?|no\.?|pos\.?|position|row|line|index|lfd\.?.*|n°|zeile)$/],
  [
    'ignore',
    /(?:datasheet|datenblatt|library|libref|orientation|lead ?time|rohs|stock|quantity available|tariff|reach|checked|added|owned|received|have|done|x$|rotation|layer|side)/,
  ],
];

export const tidyHeading = (text: string): string =>
  text.normalize('NFKC').toLowerCase().replace(/[_:*]/g, ' ').replace(/\s+/g, ' ').trim();

/** The role that a heading's words point to; null for words that are no heading. */
export function roleOfHeading(text: string): Role | null {
  const heading = tidyHeading(text);
  if (heading === '' || heading.length > 60) return null;
  return WORDS.find(([, pattern]) => pattern.test(heading))?.[0] ?? null;
}
