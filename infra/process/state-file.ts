import { chmodSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/** Reads a small JSON file of our own; undefined when it is absent or was cut short. */
export function readState<T>(file: string): T | undefined {
  try {
    return JSON.parse(readFileSync(file, 'utf8')) as T;
  } catch {
    return undefined;
  }
}

/** Replaces the file in one move, so that a reader never meets half of it. For our eyes only. */
export function writeState(file: string, value: unknown): void {
  mkdirSync(path.dirname(file), { recursive: true });
  const next = `${file}.${process.pid}.new`;
  writeFileSync(next, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  chmodSync(next, 0o600);
  renameSync(next, file);
}
