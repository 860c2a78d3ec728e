import { inflateSync } from 'node:zlib';

/**
 * The words of a PDF as far as our own documents need it: each stream unpacked, its glyphs read back
 * through the fonts' ToUnicode tables. Independent of the code that wrote the file.
 */
export function pdfText(pdf: Buffer): string {
  const objects = objectsOf(pdf);
  const fonts = fontMaps(objects);
  const pages = [...objects.values()].filter((body) => /\/Type \/Page\b/.test(body.head));
  return pages.map((page) => pageText(page.head, objects, fonts)).join('\n');
}

interface PdfObject {
  head: string;
  stream?: Buffer;
}

function objectsOf(pdf: Buffer): Map<string, PdfObject> {
  const text = pdf.toString('latin1');
  const objects = new Map<string, PdfObject>();
  for (const found of text.matchAll(/(?:^|\n)(\d+) 0 obj\n([\s\S]*?)\nendobj/g)) {
    const [, id = '', body = ''] = found;
    const at = body.indexOf('stream\n');
    if (at < 0) {
      objects.set(id, { head: body });
      continue;
    }
    const head = body.slice(0, at);
    const raw = Buffer.from(body.slice(at + 7, body.lastIndexOf('\nendstream')), 'latin1');
    const packed = head.includes('/FlateDecode');
    objects.set(id, { head, stream: packed ? inflateSync(raw) : raw });
  }
  return objects;
}

/** By the font's object number: what each glyph number stands for. */
function fontMaps(objects: Map<string, PdfObject>): Map<string, Map<string, string>> {
  const maps = new Map<string, Map<string, string>>();
  for (const [id, { head }] of objects) {
    const table = /\/ToUnicode (\d+) 0 R/.exec(head)?.[1];
    const text = table && objects.get(table)?.stream?.toString('latin1');
    if (text) maps.set(id, readTable(text));
  }
  return maps;
}

function readTable(text: string): Map<string, string> {
  const map = new Map<string, string>();
  for (const block of text.matchAll(/beginbfrange([\s\S]*?)endbfrange/g)) {
    for (const range of (block[1] ?? '').matchAll(/<(\w+)> <(\w+)> \[([^\]]*)\]/g)) {
      const first = parseInt(range[1] ?? '', 16);
      // A ligature stands for several characters, with spaces between their codes.
      [...(range[3] ?? '').matchAll(/<([\w ]+)>/g)].forEach((code, index) => {
        const codes = (code[1] ?? '').replaceAll(' ', '');
        map.set((first + index).toString(16).padStart(4, '0'), unicode(codes));
      });
    }
  }
  return map;
}

function unicode(hex: string): string {
  return Buffer.from(hex, 'hex').swap16().toString('utf16le');
}

function pageText(
  page: string,
  objects: Map<string, PdfObject>,
  fonts: Map<string, Map<string, string>>,
): string {
  const content = /\/Contents (\d+) 0 R/.exec(page)?.[1] ?? '';
  const resources = /\/Resources (\d+) 0 R/.exec(page)?.[1] ?? '';
  const names = new Map<string, string>();
  for (const [, name = '', id = ''] of (objects.get(resources)?.head ?? '').matchAll(
    /\/(F\d+) (\d+) 0 R/g,
  )) {
    names.set(name, id);
  }
  let out = '';
  let map: Map<string, string> | undefined;
  const stream = objects.get(content)?.stream?.toString('latin1') ?? '';
  for (const token of stream.matchAll(/\/(F\d+) [\d.]+ Tf|\[([^\]]*)\] TJ|(\bET\b)/g)) {
    if (token[1]) map = fonts.get(names.get(token[1]) ?? '');
    else if (token[2] !== undefined) out += glyphs(token[2], map);
    else out += '\n';
  }
  return out.replace(/[ \u00a0]+/g, ' ');
}

function glyphs(array: string, map: Map<string, string> | undefined): string {
  return [...array.matchAll(/<([0-9a-f]+)>/gi)]
    .flatMap(([, hex = '']) => hex.toLowerCase().match(/.{4}/g) ?? [])
    .map((glyph) => map?.get(glyph) ?? '')
    .join('');
}
