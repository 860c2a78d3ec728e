import { columnsOf } from './columns';
import { decodeText } from './decode';
import { FileRefused } from './file-refused';
import { delimiterOf, readTable } from './read-table';

const columns = columnsOf.parts;
const header = 'Part number,Name,Category,Unit cost';

describe('the text of a file', () => {
  it('is refused when it is neither UTF-8 nor UTF-16', () => {
    expect(() => decodeText(Buffer.from('Türen', 'latin1'))).toThrow(FileRefused);
    expect(() => decodeText(Buffer.from([0xff, 0xfe, 0x00, 0xd8, 0x41]))).toThrow(FileRefused);
  });

  it('may hold any letters without being taken for another encoding', () => {
    const text = 'Name\nЩётка\n洗濯機\n';
    expect(decodeText(Buffer.from(text))).toBe(text);
    expect(decodeText(Buffer.from(`\ufeff${text}`, 'utf16le'))).toBe(text);
  });
});

describe('a table', () => {
  it('is separated by what makes its header known, whatever else stands in it', () => {
    expect(delimiterOf(header, columns)).toBe(',');
    expect(delimiterOf(header.replaceAll(',', ';'), columns)).toBe(';');
    expect(delimiterOf(`"Part number"\t"Name"\tCategory\tUnit cost\n,,,;;;;`, columns)).toBe('\t');
  });

  it('has its columns in any order and case, and cells as they were before they were neutralised', () => {
    const rows = readTable("UNIT COST,name ,category,Part_Number\n1.50, x ,door,'=1\n", columns);
    expect(rows).toEqual([
      {
        row: 2,
        cells: { unitCost: '1.50', name: 'x', category: 'door', number: '=1' },
        tooLong: false,
      },
    ]);
  });

  it('counts a row with line breaks as one, and passes over empty ones', () => {
    const rows = readTable(`${header}\r\n1,"a\r\nb",c,1\r\n,,,\r\n\r\n2,a,c,1`, columns);
    expect(rows.map((row) => [row.row, row.cells.number])).toEqual([
      [2, '1'],
      [5, '2'],
    ]);
  });

  it('may be short of cells, and says when it has too many', () => {
    const rows = readTable(`${header}\n1\n2,a,c,1,,\n3,a,c,1,x`, columns);
    expect(rows.map((row) => row.tooLong)).toEqual([false, false, true]);
    expect(rows[0]?.cells).toEqual({ number: '1', name: '', category: '', unitCost: '' });
  });

  it('is refused past 20,000 rows', () => {
    expect(() => readTable(`${header}\n${'1,a,c,1\n'.repeat(20_001)}`, columns)).toThrow(
      /20001 rows/,
    );
  });
});
