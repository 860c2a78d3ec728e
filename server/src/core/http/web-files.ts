import { existsSync } from 'node:fs';
import { readFile, stat } from 'node:fs/promises';
import { extname, join, normalize, sep } from 'node:path';
import { type RequestHandler, type Response } from 'express';

const types: Record<string, string> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json',
  '.webmanifest': 'application/manifest+json',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.woff': 'font/woff',
  '.txt': 'text/plain; charset=utf-8',
};
const encodings = [
  ['br', '.br'],
  ['gzip', '.gz'],
] as const;

/** Headers that only a page heeds; on each of its many small files they would cost half a kB. */
const ofPages = [
  'Content-Security-Policy',
  'Cross-Origin-Opener-Policy',
  'Origin-Agent-Cluster',
  'Referrer-Policy',
  'Strict-Transport-Security',
  'X-DNS-Prefetch-Control',
  'X-Download-Options',
  'X-Frame-Options',
  'X-Permitted-Cross-Domain-Policies',
  'X-XSS-Protection',
];

interface WebFile {
  type: string;
  content: Map<string, Buffer>;
  immutable: boolean;
}

/**
 * Serves the built web application from memory, compressed when it was built. Files whose name
 * carries a hash are kept by browsers for a year; the page itself is asked for each time.
 */
export function webFiles(folder: string): RequestHandler {
  const files = new Map<string, Promise<WebFile | undefined>>();
  const read = (path: string) => {
    let file = files.get(path);
    if (!file) files.set(path, (file = load(folder, path)));
    // Only the finished build is worth remembering; a missing file may come with the next one.
    void file.then((found) => found ?? files.delete(path));
    return file;
  };
  return async (request, response, next) => {
    if (request.method !== 'GET' && request.method !== 'HEAD') return next();
    if (request.path.startsWith('/api/')) return next();
    const file = await read(request.path);
    if (file) return send(response, file, request.get('accept-encoding') ?? '');
    // Addresses of pages have no ending: the application itself shows the page.
    if (extname(request.path)) return next();
    const page = await read('/index.html');
    if (!page) return next();
    send(response, page, request.get('accept-encoding') ?? '');
  };
}

async function load(folder: string, path: string): Promise<WebFile | undefined> {
  const clean = normalize(join(folder, path === '/' ? 'index.html' : path));
  if (!clean.startsWith(normalize(folder) + sep)) return undefined;
  const found = await stat(clean).catch(() => undefined);
  if (!found?.isFile()) return undefined;
  const content = new Map([['identity', await readFile(clean)]]);
  for (const [encoding, ending] of encodings) {
    if (existsSync(clean + ending)) content.set(encoding, await readFile(clean + ending));
  }
  return {
    type: types[extname(clean)] ?? 'application/octet-stream',
    content,
    immutable: /-[\w-]{8}\.\w+$/.test(clean),
  };
}

function send(response: Response, file: WebFile, accepted: string): void {
  const encoding = encodings.find(
    ([name]) => file.content.has(name) && new RegExp(`\\b${name}\\b`).test(accepted),
  )?.[0];
  const body = file.content.get(encoding ?? 'identity') as Buffer;
  response
    .status(200)
    .set('Content-Type', file.type)
    .set('Vary', 'Accept-Encoding')
    .set('Cache-Control', file.immutable ? 'public, max-age=31536000, immutable' : 'no-cache');
  if (encoding) response.set('Content-Encoding', encoding);
  if (file.immutable) for (const name of ofPages) response.removeHeader(name);
  response.end(body);
}
