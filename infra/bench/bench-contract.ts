import { type Stack } from '../stack/stack';

/** What a bench in test/bench is given. */
export interface BenchContext {
  stack: Stack;
  /** The arguments after its name, `--json FILE` taken out. */
  args: readonly string[];
  say(text: string): void;
}

/** What it hands back: rows for people and for the JSON file, and whether its targets were met. */
export interface BenchResult {
  rows: Record<string, string | number>[];
  met: boolean;
  /** Whatever else should be in the JSON file. */
  details?: unknown;
}

export type Bench = (context: BenchContext) => Promise<BenchResult>;

/** What a file `test/bench/<name>.bench.ts` exports. */
export interface BenchFile {
  bench: Bench;
  /** The web application is built first; else only the server is. */
  needsWeb?: boolean;
}
