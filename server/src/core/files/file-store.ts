import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdir, readFile, rename, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { type Readable } from 'node:stream';
import { v7 as uuid } from 'uuid';

/** Keeps bytes under the hash of what they are, per shop. A disk by default; S3 could serve as well. */
export interface FileStore {
  /** Keeps the bytes and answers with their SHA-256 (hex). Keeping the same bytes again is harmless. */
  put(shopId: string, content: Buffer): Promise<string>;
  get(shopId: string, sha256: string): Promise<Buffer>;
  stream(shopId: string, sha256: string): Readable;
  has(shopId: string, sha256: string): Promise<boolean>;
}

export function diskFileStore(folder: string): FileStore {
  const place = (shopId: string, sha256: string) =>
    join(folder, shopId, sha256.slice(0, 2), sha256);
  const has = (shopId: string, sha256: string) =>
    stat(place(shopId, sha256)).then(
      () => true,
      () => false,
    );
  return {
    has,
    async put(shopId, content) {
      const sha256 = createHash('sha256').update(content).digest('hex');
      if (await has(shopId, sha256)) return sha256;
      const path = place(shopId, sha256);
      await mkdir(join(path, '..'), { recursive: true });
      // Written beside and renamed, so that a file under its hash is always whole.
      const draft = `${path}.${uuid()}`;
      await writeFile(draft, content);
      await rename(draft, path);
      return sha256;
    },
    get: (shopId, sha256) => readFile(place(shopId, sha256)),
    stream: (shopId, sha256) => createReadStream(place(shopId, sha256)),
  };
}

let store: FileStore | undefined;

export function useFileStore(chosen: FileStore): void {
  store = chosen;
}

export function files(): FileStore {
  if (!store) throw new Error('No file store: call useFileStore first.');
  return store;
}
