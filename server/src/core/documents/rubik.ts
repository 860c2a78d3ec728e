import { readFileSync } from 'node:fs';
import { create, type Font } from 'fontkit';
import { unpackWoff } from './woff';

export type Weight = 400 | 600;
export type Subset = 'latin' | 'latin-ext' | 'cyrillic' | 'cyrillic-ext';

const parsed = new Map<string, Font>();

/**
 * A part of the Rubik typeface, ready for the PDF library. Reading a font costs as much as setting a
 * page, so each is read once a process and shared by all its documents.
 */
export function rubik(subset: Subset, weight: Weight): Font {
  const name = `${subset}-${weight}`;
  let font = parsed.get(name);
  if (!font) {
    font = create(rubikFile(subset, weight)) as Font;
    parsed.set(name, font);
  }
  return font;
}

/** The same as a TrueType file. */
export function rubikFile(subset: Subset, weight: Weight): Buffer {
  const name = `rubik-${subset}-${weight}-normal.woff`;
  return unpackWoff(readFileSync(require.resolve(`@fontsource/rubik/files/${name}`)));
}

// As the typeface's own style sheet divides it (`unicode-range`).
const ranges: Record<Exclude<Subset, 'latin'>, [number, number][]> = {
  'latin-ext': [
    [0x100, 0x2ba],
    [0x1e00, 0x1e9f],
    [0x1ef2, 0x1eff],
    [0x20a0, 0x20ab],
    [0x20ad, 0x20c0],
  ],
  cyrillic: [
    [0x400, 0x45f],
    [0x490, 0x491],
    [0x4b0, 0x4b1],
    [0x2116, 0x2116],
  ],
  'cyrillic-ext': [
    [0x460, 0x52f],
    [0x20b4, 0x20b4],
  ],
};
const latinBeyond = [0x131, 0x152, 0x153];

function subsetOf(codePoint: number): Subset {
  if (codePoint < 0x100 || latinBeyond.includes(codePoint)) return 'latin';
  for (const [subset, spans] of Object.entries(ranges)) {
    if (spans.some(([from, to]) => codePoint >= from && codePoint <= to)) return subset as Subset;
  }
  return 'latin';
}

export interface Run {
  subset: Subset;
  text: string;
}

/** The text cut where another part of the typeface must take over. */
export function runsOf(text: string): Run[] {
  const runs: Run[] = [];
  for (const character of text) {
    const subset = subsetOf(character.codePointAt(0) ?? 0);
    const last = runs.at(-1);
    if (last?.subset === subset) last.text += character;
    else runs.push({ subset, text: character });
  }
  return runs;
}
