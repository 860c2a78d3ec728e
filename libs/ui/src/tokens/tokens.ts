/**
 * The colours of the look, in both schemes. `tokens.scss` carries the same values as custom
 * properties; a spec keeps the two equal, and a check tests every pair below for contrast.
 */
interface SchemePair {
  readonly light: string;
  readonly dark: string;
}

export const colours = {
  paper: { light: '#fbfaf5', dark: '#14171f' },
  sheet: { light: '#fffefb', dark: '#1c202b' },
  ink: { light: '#1d2436', dark: '#e9e7df' },
  soft: { light: '#5a6172', dark: '#a9afbd' },
  carbon: { light: '#3a3f9c', dark: '#aeb2ff' },
  'on-carbon': { light: '#ffffff', dark: '#1d2436' },
  alarm: { light: '#b3361f', dark: '#ff9a82' },
  'on-alarm': { light: '#ffffff', dark: '#1d2436' },
  ochre: { light: '#8a5a00', dark: '#e0b040' },
  hairline: { light: '#d9d6cb', dark: '#343a48' },
  'field-line': { light: '#7b8090', dark: '#7f8698' },
  'alarm-wash': { light: '#fcece8', dark: '#3a221d' },
  'ochre-wash': { light: '#fdf4e0', dark: '#332a15' },
  'white-tint': { light: '#eeeef9', dark: '#262a45' },
  'canary-tint': { light: '#fdf6d8', dark: '#302d1c' },
  'rose-tint': { light: '#fbe9ee', dark: '#35252c' },
  'stub-tint': { light: '#eaefeb', dark: '#252d2a' },
} as const satisfies Record<string, SchemePair>;

export type Colour = keyof typeof colours;

/** The top edge of each copy of the ticket; the same in both schemes. */
export const copyEdges = {
  white: '#3a3f9c',
  canary: '#f6d958',
  rose: '#eb9bb0',
  stub: '#a9bbae',
} as const;

export type Copy = keyof typeof copyEdges;

const surfaces = ['paper', 'sheet'] as const satisfies readonly Colour[];
const tints = [
  'white-tint',
  'canary-tint',
  'rose-tint',
  'stub-tint',
] as const satisfies readonly Colour[];
const inks = ['ink', 'soft', 'carbon', 'alarm', 'ochre'] as const satisfies readonly Colour[];

interface ContrastPair {
  readonly text: Colour;
  readonly on: Colour;
  /** WCAG 2.2: 4.5 for text (1.4.3), 3 for what only outlines a control (1.4.11). */
  readonly atLeast: 4.5 | 3;
}

/** Every pair of colours that is put on screen as text on ground, or as a control's outline. */
export const contrastPairs: readonly ContrastPair[] = [
  ...inks.flatMap((text) =>
    [...surfaces, ...tints].map((on): ContrastPair => ({ text, on, atLeast: 4.5 })),
  ),
  { text: 'on-carbon', on: 'carbon', atLeast: 4.5 },
  { text: 'on-alarm', on: 'alarm', atLeast: 4.5 },
  { text: 'ink', on: 'alarm-wash', atLeast: 4.5 },
  { text: 'alarm', on: 'alarm-wash', atLeast: 4.5 },
  { text: 'ink', on: 'ochre-wash', atLeast: 4.5 },
  { text: 'ochre', on: 'ochre-wash', atLeast: 4.5 },
  { text: 'field-line', on: 'paper', atLeast: 3 },
  { text: 'field-line', on: 'sheet', atLeast: 3 },
];
