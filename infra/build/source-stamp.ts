import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';

function* filesUnder(place: string): Generator<string> {
  if (!existsSync(place)) return;
  if (statSync(place).isFile()) {
    yield place;
    return;
  }
  for (const name of readdirSync(place).sort()) yield* filesUnder(path.join(place, name));
}

/** A word that changes when any of these files or folders does. */
export function hashOf(places: readonly string[]): string {
  const hash = createHash('sha256');
  for (const place of places) {
    for (const file of filesUnder(place)) {
      // Specs are not part of what is built; touching one should not cost a build.
      if (file.endsWith('.spec.ts')) continue;
      hash.update(file).update('\0').update(readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}

/** Runs `build` unless the stamp in the output says that these sources were built already. */
export async function whenChanged(
  output: string,
  sources: readonly string[],
  build: () => Promise<void>,
): Promise<'built' | 'unchanged'> {
  const stamp = path.join(path.dirname(output), `.${path.basename(output)}.stamp`);
  const hash = hashOf(sources);
  if (existsSync(output) && existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) {
    return 'unchanged';
  }
  await build();
  writeFileSync(stamp, hash);
  return 'built';
}
