import { type SpawnOptions } from 'node:child_process';
/** Runs a program; resolves with its output, rejects with the last lines of it. */
export function quietRun(
  command: string,
  args: readonly string[],
  options?: SpawnOptions & { todo?: string },
): Promise<string>;
