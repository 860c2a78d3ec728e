import { expect, test } from './support/test';

/** Of what must be there before anything is seen: the document, scripts and styles. */
const limit = 140_000;

interface Loaded {
  path: string;
  kind: string;
  encoding: string;
  bytes: number;
}

test('a first visit to the sign-in page loads little', async ({ page }, info) => {
  const client = await page.context().newCDPSession(page);
  await client.send('Network.enable');
  const loaded = new Map<string, Loaded>();
  client.on('Network.responseReceived', ({ requestId, response, type }) => {
    const { pathname } = new URL(response.url);
    const encoding = response.headers['Content-Encoding'] ?? response.headers['content-encoding'];
    loaded.set(requestId, { path: pathname, kind: type, encoding: encoding ?? '', bytes: 0 });
  });
  // With its headers, as it came over the wire.
  client.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    const one = loaded.get(requestId);
    if (one) one.bytes = encodedDataLength;
  });
  await page.goto('/sign-in', { waitUntil: 'networkidle' });
  await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible();

  const all = [...loaded.values()].sort((a, b) => b.bytes - a.bytes);
  const sum = (kinds: string[]) =>
    all.filter(({ kind }) => kinds.includes(kind)).reduce((bytes, one) => bytes + one.bytes, 0);
  const needed = sum(['Document', 'Script', 'Stylesheet']);
  const fonts = sum(['Font']);
  const words = `${needed} bytes of document, scripts and styles, ${fonts} of fonts`;
  const list = all.map(({ bytes, kind, path }) => `${bytes}\t${kind}\t${path}`);
  await info.attach('loaded.txt', { body: [words, ...list].join('\n') });
  console.log(`First load: ${words}`);

  // Brotli makes nothing smaller of the smallest files; they are sent as they are.
  for (const { path, kind, encoding, bytes } of all) {
    if (kind === 'Script' && bytes > 1_000) expect(encoding, path).toBe('br');
  }
  expect(needed).toBeGreaterThan(50_000);
  expect(needed).toBeLessThanOrEqual(limit);
  // They come after the words, which are readable without.
  expect(fonts).toBeLessThanOrEqual(45_000);
});
