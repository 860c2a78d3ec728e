import { csvRow } from './csv-row';

describe('csvRow', () => {
  it('ends a row as RFC 4180 says, and quotes what must be', () => {
    expect(csvRow(['Quay 9, "north"', 'two\nlines', '2116.70', ''])).toBe(
      '"Quay 9, ""north""","two\nlines",2116.70,\r\n',
    );
  });

  it('keeps a spreadsheet from calculating what somebody wrote, and a credit a number', () => {
    expect(csvRow(['=SUM(A1)', '-12.50'])).toBe("'=SUM(A1),-12.50\r\n");
  });
});
