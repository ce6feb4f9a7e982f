/** How the bands of IEC 60062 are named and filled when drawn. */

export const BAND_COLOURS = [
  'black',
  'brown',
  'red',
  'orange',
  'yellow',
  'green',
  'blue',
  'violet',
  'grey',
  'white',
  'gold',
  'silver',
  'pink',
] as const;
export type BandColour = (typeof BAND_COLOURS)[number];

// Written out, because Tailwind keeps only the class names that it can read in the source.
export const BAND_FILL: Readonly<Record<BandColour, string>> = {
  black: 'fill-band-black',
  brown: 'fill-band-brown',
  red: 'fill-band-red',
  orange: 'fill-band-orange',
  yellow: 'fill-band-yellow',
  green: 'fill-band-green',
  blue: 'fill-band-blue',
  violet: 'fill-band-violet',
  grey: 'fill-band-grey',
  white: 'fill-band-white',
  gold: 'fill-band-gold',
  silver: 'fill-band-silver',
  pink: 'fill-band-pink',
};
