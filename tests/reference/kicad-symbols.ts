/**
 * Reads Debian's kicad-symbols (package kicad-symbols, CC-BY-SA 4.0 with its exception for designs) from where it is
 * installed; nothing of it is copied into the project.
 */
import { existsSync, readFileSync } from 'node:fs';

const DIRECTORY = '/usr/share/kicad/symbols';

export interface DatasetPin {
  readonly number: string;
  readonly name: string;
  /** input, output, open_collector, tri_state, bidirectional, passive, power_in, power_out, no_connect … */
  readonly type: string;
  /** 0 stands for pins common to all units. */
  readonly unit: number;
}

export interface DatasetSymbol {
  readonly library: string;
  readonly name: string;
  readonly footprint: string;
  readonly pins: readonly DatasetPin[];
}

type Node = string | readonly Node[];

function parse(text: string): Node {
  const stack: Node[][] = [[]];
  for (const token of text.match(/"(?:\\.|[^"\\])*"|[()]|[^\s()"]+/g) ?? []) {
    if (token === '(') stack.push([]);
    else if (token === ')') {
      const list = stack.pop() ?? [];
      stack.at(-1)?.push(list);
    } else stack.at(-1)?.push(token.startsWith('"') ? token.slice(1, -1) : token);
  }
  return stack[0]?.[0] ?? '';
}

const isList = (node: Node | undefined): node is readonly Node[] => Array.isArray(node);
const named = (node: Node, name: string): readonly (readonly Node[])[] =>
  isList(node) ? node.filter((child): child is readonly Node[] => isList(child) && child[0] === name) : [];
const word = (node: Node | undefined): string => (typeof node === 'string' ? node : '');

/**
 * @throws Error where the package is not installed: a missing reference is a failed test, not a skipped one
 */
export function readLibrary(library: string): DatasetSymbol[] {
  const path = `${DIRECTORY}/${library}.kicad_sym`;
  if (!existsSync(path))
    throw new Error(
      `${path} is missing: install Debian's kicad-symbols (apt-get install --no-install-recommends kicad-symbols)`,
    );
  const symbols = named(parse(readFileSync(path, 'utf8')), 'symbol');
  const byName = new Map(symbols.map((symbol) => [word(symbol[1]), symbol]));
  return symbols.map((symbol) => {
    // One level of `extends` in this release: the child carries properties, the parent the pins.
    const parent = word(named(symbol, 'extends')[0]?.[1]);
    const footprint = named(symbol, 'property').find((property) => property[1] === 'Footprint');
    return {
      library,
      name: word(symbol[1]),
      footprint: word(footprint?.[2]),
      pins: pinsOf(byName.get(parent) ?? symbol),
    };
  });
}

function pinsOf(symbol: readonly Node[]): DatasetPin[] {
  return named(symbol, 'symbol').flatMap((drawing) => {
    const [, unit = '0', style = '1'] = /_(\d+)_(\d+)$/.exec(word(drawing[1])) ?? [];
    // Style 2 is the De Morgan drawing of the same pins.
    if (style === '2') return [];
    return named(drawing, 'pin').map((pin) => ({
      type: word(pin[1]),
      name: word(named(pin, 'name')[0]?.[1]),
      number: word(named(pin, 'number')[0]?.[1]),
      unit: Number(unit),
    }));
  });
}
