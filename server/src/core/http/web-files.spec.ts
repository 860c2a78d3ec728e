import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { brotliCompressSync } from 'node:zlib';
import express from 'express';
import request from 'supertest';
import { securityHeaders } from './security';
import { webFiles } from './web-files';

const folder = mkdtempSync(path.join(tmpdir(), 'tumblewright-web-'));
const script = 'console.log("main");'.repeat(50);
const app = express().use(securityHeaders()).use(webFiles(folder));

beforeAll(() => {
  writeFileSync(path.join(folder, 'index.html'), '<!doctype html><title>It</title>');
  for (const name of ['main-2CG7OIGC.js', 'chunk-Cl6X-ZL_.js', 'ngsw-worker.js']) {
    writeFileSync(path.join(folder, name), script);
    writeFileSync(path.join(folder, `${name}.br`), brotliCompressSync(script));
  }
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe('serving the web application', () => {
  it('shows the page at every address without an ending, asked for each time', async () => {
    const answer = await request(app).get('/shop/stores');
    expect(answer.text).toContain('<title>It</title>');
    expect(answer.get('Cache-Control')).toBe('no-cache');
    expect(answer.get('Content-Security-Policy')).toContain("script-src 'self'");
  });

  it.each(['/main-2CG7OIGC.js', '/chunk-Cl6X-ZL_.js'])(
    'sends %s packed, to be kept, without what only a page heeds',
    async (name) => {
      const answer = await request(app).get(name).set('Accept-Encoding', 'gzip, br');
      expect(answer.get('Content-Encoding')).toBe('br');
      expect(answer.get('Cache-Control')).toContain('immutable');
      expect(answer.get('X-Content-Type-Options')).toBe('nosniff');
      expect(answer.get('Cross-Origin-Resource-Policy')).toBe('same-origin');
      expect(answer.get('Content-Security-Policy')).toBeUndefined();
      expect(answer.text).toBe(script);
    },
  );

  it('asks anew for the service worker, which has the rules of a page', async () => {
    const answer = await request(app).get('/ngsw-worker.js').set('Accept-Encoding', 'identity');
    expect(answer.get('Content-Encoding')).toBeUndefined();
    expect(answer.get('Cache-Control')).toBe('no-cache');
    expect(answer.get('Content-Security-Policy')).toBeDefined();
  });

  it('has nothing for a file that is not there, or outside', async () => {
    expect((await request(app).get('/gone-2CG7OIGC.js')).status).toBe(404);
    expect((await request(app).get('/..%2f..%2fetc%2fpasswd.txt')).status).toBe(404);
  });
});
