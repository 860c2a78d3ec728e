import { inflateSync } from 'node:zlib';

interface Table {
  tag: Buffer;
  checksum: number;
  length: number;
  content: Buffer;
}

/**
 * The TrueType font inside a WOFF 1 file. Unpacked once at the start, because the PDF library would
 * do it in slow JavaScript for every single document.
 *
 * Source: W3C, WOFF File Format 1.0, sections 3 to 5.
 */
export function unpackWoff(woff: Buffer): Buffer {
  if (woff.toString('latin1', 0, 4) !== 'wOFF') throw new Error('Not a WOFF font');
  const flavor = woff.readUInt32BE(4);
  const count = woff.readUInt16BE(12);
  const tables = Array.from({ length: count }, (_, index) => readTable(woff, 44 + index * 20));
  return writeFont(flavor, tables);
}

function readTable(woff: Buffer, at: number): Table {
  const offset = woff.readUInt32BE(at + 4);
  const packed = woff.readUInt32BE(at + 8);
  const length = woff.readUInt32BE(at + 12);
  const stored = woff.subarray(offset, offset + packed);
  return {
    tag: woff.subarray(at, at + 4),
    checksum: woff.readUInt32BE(at + 16),
    length,
    content: packed < length ? inflateSync(stored) : stored,
  };
}

function writeFont(flavor: number, tables: Table[]): Buffer {
  const selector = Math.floor(Math.log2(tables.length));
  const range = 2 ** selector * 16;
  const header = Buffer.alloc(12 + tables.length * 16);
  header.writeUInt32BE(flavor, 0);
  header.writeUInt16BE(tables.length, 4);
  header.writeUInt16BE(range, 6);
  header.writeUInt16BE(selector, 8);
  header.writeUInt16BE(tables.length * 16 - range, 10);
  const parts: Buffer[] = [header];
  let offset = header.length;
  tables.forEach((table, index) => {
    const at = 12 + index * 16;
    table.tag.copy(header, at);
    header.writeUInt32BE(table.checksum, at + 4);
    header.writeUInt32BE(offset, at + 8);
    header.writeUInt32BE(table.length, at + 12);
    const padded = Buffer.alloc(Math.ceil(table.length / 4) * 4);
    table.content.copy(padded);
    parts.push(padded);
    offset += padded.length;
  });
  return Buffer.concat(parts);
}
