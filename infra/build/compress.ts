import { readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

const squeezable = /\.(js|css|html|svg|json|webmanifest|txt|ico)$/;
const tooSmall = 512;

function filesUnder(folder: string): string[] {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => path.join(entry.parentPath, entry.name));
}

async function compress(file: string): Promise<void> {
  const content = readFileSync(file);
  const [brotli, zipped] = await Promise.all([
    promisify(brotliCompress)(content, {
      params: {
        [constants.BROTLI_PARAM_QUALITY]: constants.BROTLI_MAX_QUALITY,
        [constants.BROTLI_PARAM_SIZE_HINT]: content.length,
      },
    }),
    promisify(gzip)(content, { level: 9 }),
  ]);
  if (brotli.length < content.length) writeFileSync(`${file}.br`, brotli);
  if (zipped.length < content.length) writeFileSync(`${file}.gz`, zipped);
}

/** Leaves `x.js.br` and `x.js.gz` beside `x.js`, so that no request waits for compressing. */
export async function precompress(folder: string): Promise<void> {
  const files = filesUnder(folder).filter(
    (file) => squeezable.test(file) && statSync(file).size >= tooSmall,
  );
  await Promise.all(files.map(compress));
}
