import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { colours, contrastPairs, copyEdges } from './tokens';

const scss = readFileSync(join(__dirname, 'tokens.scss'), 'utf8');

describe('tokens', () => {
  it.each(Object.entries(colours))(
    '%s is the same in TypeScript and in the sheet',
    (name, pair) => {
      expect(scss).toContain(`--tw-${name}: light-dark(${pair.light}, ${pair.dark});`);
    },
  );

  it.each(Object.entries(copyEdges))('the %s edge is the same in both', (name, edge) => {
    expect(scss).toContain(`--tw-edge-${name}: ${edge};`);
  });

  it('the sheet has no colour that TypeScript does not know', () => {
    const named = [...scss.matchAll(/--tw-([\w-]+): light-dark/g)].map((m) => m[1]);
    expect(named.sort()).toEqual(Object.keys(colours).sort());
  });

  it('every text colour is paired with every ground it stands on', () => {
    expect(
      contrastPairs.filter((pair) => pair.on === 'sheet' && pair.atLeast === 4.5),
    ).toHaveLength(5);
  });
});
