import fc from 'fast-check';
import { neutraliseFormula, restoreCell } from './formula-cell';

describe('neutraliseFormula', () => {
  it.each(['-12.50', '-0', '12.50', 'Door lock', 'a=b', '', "'quoted", '3-4', 'a@b.example'])(
    'leaves %p as it is',
    (cell) => {
      expect(neutraliseFormula(cell)).toBe(cell);
    },
  );

  it.each([
    '=1+2',
    '+15550100',
    '-2+3',
    '-12.50-cmd',
    '- 5',
    '--5',
    '-1,5',
    '@sum(a1)',
    '\t=1',
    '\r=1',
    '\n=1',
    '\ttab',
    ' =1',
    '\u0000=1',
    '\ufeff=1',
    '\uff1d1+2',
    '-',
  ])('puts a quote before %j', (cell) => {
    expect(neutraliseFormula(cell)).toBe(`'${cell}`);
  });

  it('keeps apart what was quoted before', () => {
    expect(neutraliseFormula("'=1")).toBe("''=1");
    expect(restoreCell("''=1")).toBe("'=1");
    expect(restoreCell("'tis")).toBe("'tis");
  });

  const cells = fc.oneof(
    fc.string({ unit: fc.constantFrom("'", '=', '+', '-', '@', '\t', '\r', '1', 'a', '.', ' ') }),
    fc.string({ unit: 'binary' }),
  );

  it('can always be undone, and leaves nothing that begins a formula', () => {
    fc.assert(
      fc.property(cells, (cell) => {
        const written = neutraliseFormula(cell);
        expect(restoreCell(written)).toBe(cell);
        if (/^[=+\-@\t\r\n]/.test(written)) expect(written).toMatch(/^-\d+(\.\d+)?$/);
      }),
      { numRuns: 1000 },
    );
  });
});
