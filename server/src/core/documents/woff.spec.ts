import { rubik, rubikFile, runsOf } from './rubik';
import { unpackWoff } from './woff';

/** Source: OpenType 1.9, "Calculating Checksums": the sum of a table's words, modulo 2 to the 32. */
function checksum(table: Buffer): number {
  let sum = 0;
  for (let at = 0; at < table.length; at += 4) sum = (sum + table.readUInt32BE(at)) >>> 0;
  return sum;
}

describe('the typeface of documents', () => {
  it.each(['latin', 'latin-ext', 'cyrillic', 'cyrillic-ext'] as const)(
    'is unpacked whole (%s)',
    (subset) => {
      const font = rubikFile(subset, 400);
      expect(font.readUInt32BE(0)).toBe(0x00010000);
      const tags: string[] = [];
      for (let n = 0; n < font.readUInt16BE(4); n += 1) {
        const at = 12 + n * 16;
        const tag = font.toString('latin1', at, at + 4);
        tags.push(tag);
        const offset = font.readUInt32BE(at + 8);
        const padded = Math.ceil(font.readUInt32BE(at + 12) / 4) * 4;
        const table = Buffer.from(font.subarray(offset, offset + padded));
        // The head table's own checksum is reckoned as if its adjustment were zero.
        if (tag === 'head') table.writeUInt32BE(0, 8);
        expect([tag, checksum(table)]).toEqual([tag, font.readUInt32BE(at + 4)]);
      }
      expect(tags).toEqual(expect.arrayContaining(['cmap', 'glyf', 'head', 'hmtx', 'loca']));
    },
  );

  it('is read once a process', () => {
    expect(rubik('latin', 600)).toBe(rubik('latin', 600));
  });

  it('is no font when it is none', () => {
    expect(() => unpackWoff(Buffer.from('OTTO and so on, long enough'))).toThrow('Not a WOFF');
  });

  it('changes its part where a text needs another', () => {
    expect(runsOf('Łódź, 5 € – Київ')).toEqual([
      { subset: 'latin-ext', text: 'Ł' },
      { subset: 'latin', text: 'ód' },
      { subset: 'latin-ext', text: 'ź' },
      { subset: 'latin', text: ', 5 € – ' },
      { subset: 'cyrillic', text: 'Київ' },
    ]);
  });
});
