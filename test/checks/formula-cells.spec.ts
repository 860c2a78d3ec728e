/**
 * OWASP, "CSV Injection": a cell must not begin with one of seven characters; each field gets a
 * single quote before it, stands in double quotes, and doubles every double quote in it.
 */
import { neutraliseFormula } from '@lib/domain';
import { parse } from 'csv-parse/sync';

/** RFC 4180, rules 5 to 7: as a CSV writer escapes a field. */
const field = (cell: string) => `"${neutraliseFormula(cell).replaceAll('"', '""')}"`;

describe('formula cells', () => {
  it.each([
    [`=1+2";=1+2`, `"'=1+2"";=1+2"`],
    [`=1+2'" ;,=1+2`, `"'=1+2'"" ;,=1+2"`],
  ])('%s is written as printed, %s', (cell, written) => {
    expect(field(cell)).toBe(written);
  });

  it.each(['=', '+', '-', '@', '\t', '\r', '\n'])('no cell begins with %j', (character) => {
    const cell = `${character}SUM(A1)`;
    expect(neutraliseFormula(cell)).toBe(`'${cell}`);
    // An independent reader still sees one cell, and it begins with the quote.
    expect(parse(`${field(cell)},next\r\n`)).toEqual([[`'${cell}`, 'next']]);
  });
});
