/** Source: RFC 4180, section 2, its rules 1 to 7 with the examples printed under each. */
import { parse } from 'csv-parse/sync';

const read = (text: string) => parse(text) as string[][];

describe('CSV, RFC 4180, section 2', () => {
  const two = [
    ['aaa', 'bbb', 'ccc'],
    ['zzz', 'yyy', 'xxx'],
  ];

  it('1 and 2: records on lines of their own, with or without a last line break', () => {
    expect(read('aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n')).toEqual(two);
    expect(read('aaa,bbb,ccc\r\nzzz,yyy,xxx')).toEqual(two);
  });

  it('3: a header line names the fields', () => {
    const text = 'field_name,field_name2\r\naaa,bbb\r\n';
    expect(parse(text, { columns: true })).toEqual([{ field_name: 'aaa', field_name2: 'bbb' }]);
  });

  it('4: spaces belong to a field, and every line has as many fields', () => {
    expect(read('aaa, bbb ,ccc')).toEqual([['aaa', ' bbb ', 'ccc']]);
    expect(() => read('aaa,bbb,ccc\r\nzzz,yyy\r\n')).toThrow(/Record Length/);
  });

  it('5: fields may be quoted or not, but not by half', () => {
    expect(read('"aaa","bbb","ccc"\r\nzzz,yyy,xxx')).toEqual(two);
    expect(() => read('a"a,bbb')).toThrow(/Quote/);
    expect(() => read('"aaa')).toThrow(/Quote/);
  });

  it('6: line breaks, quotes and commas stand in quoted fields', () => {
    expect(read('"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx')).toEqual([
      ['aaa', 'b\r\nbb', 'ccc'],
      two[1],
    ]);
    expect(read('"a,a",b')).toEqual([['a,a', 'b']]);
  });

  it('7: a quote in a quoted field is written twice', () => {
    expect(read('"aaa","b""bb","ccc"')).toEqual([['aaa', 'b"bb', 'ccc']]);
  });
});
