import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { isOurs, isNamedBy } from './alive';

let child: ChildProcess;
let folder: string;

beforeAll(async () => {
  folder = mkdtempSync(path.join(tmpdir(), 'alive-'));
  child = spawn(process.execPath, ['-e', 'setInterval(() => 0, 1000) /* some-server */']);
  await once(child, 'spawn');
});

afterAll(async () => {
  child.kill('SIGKILL');
  await once(child, 'exit');
  rmSync(folder, { recursive: true });
});

function fileWritten(at: Date): string {
  const file = path.join(folder, `${at.getTime()}.json`);
  writeFileSync(file, '{}');
  utimesSync(file, at, at);
  return file;
}

describe('telling our processes from strangers', () => {
  it('knows ours by a word of its command line', () => {
    expect(isOurs(child.pid as number, 'some-server')).toBe(true);
    expect(isOurs(child.pid as number, 'another-server')).toBe(false);
  });

  it('takes one that a file names for ours when it began before the file was written', () => {
    const file = fileWritten(new Date(Date.now() + 60_000));
    expect(isNamedBy(file, child.pid as number, 'some-server')).toBe(true);
  });

  it('takes one that began later for a stranger with the same number', () => {
    const file = fileWritten(new Date(Date.now() - 3_600_000));
    expect(isNamedBy(file, child.pid as number, 'some-server')).toBe(false);
  });

  it('finds nobody when the file is gone', () => {
    expect(isNamedBy(path.join(folder, 'none'), child.pid as number, 'some-server')).toBe(false);
  });
});
