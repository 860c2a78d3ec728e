import {
  appendFileSync,
  existsSync,
  mkdirSync,
  readFileSync,
  renameSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';

/**
 * An object of the API. Names that begin with an underscore are the fake's own notes and are never
 * shown.
 */
export interface Thing {
  id: string;
  object: string;
  created: number;
  [name: string]: unknown;
}

interface Line {
  account: string;
  thing: Thing;
}

/** The account that owns the key: what is asked without a Stripe-Account header. */
export const platform = '';

/** Everything the fake knows, by account; each change is appended to a file when there is one. */
export class Books {
  private readonly accounts = new Map<string, Map<string, Thing>>();

  constructor(private readonly file?: string) {
    if (!file) return;
    mkdirSync(path.dirname(file), { recursive: true });
    if (!existsSync(file)) return;
    for (const text of readFileSync(file, 'utf8').split('\n')) {
      const line = parseLine(text);
      if (line) this.of(line.account).set(line.thing.id, line.thing);
    }
    this.compact(file);
  }

  private of(account: string): Map<string, Thing> {
    const known = this.accounts.get(account) ?? new Map<string, Thing>();
    this.accounts.set(account, known);
    return known;
  }

  get(account: string, id: string): Thing | undefined {
    return this.of(account).get(id);
  }

  put(account: string, thing: Thing): Thing {
    this.of(account).set(thing.id, thing);
    if (this.file) appendFileSync(this.file, lineOf({ account, thing }));
    return thing;
  }

  /** Newest first, as the API lists. */
  all(account: string, object: string): Thing[] {
    return [...this.of(account).values()].filter((thing) => thing.object === object).reverse();
  }

  accountIds(): string[] {
    return [...this.accounts.keys()];
  }

  clear(): void {
    this.accounts.clear();
    if (this.file) writeFileSync(this.file, '');
  }

  /** One line per object again, after a life of changes. */
  private compact(file: string): void {
    const lines = [...this.accounts].flatMap(([account, things]) =>
      [...things.values()].map((thing) => lineOf({ account, thing })),
    );
    writeFileSync(`${file}.new`, lines.join(''), { mode: 0o600 });
    renameSync(`${file}.new`, file);
  }
}

function lineOf(line: Line): string {
  return `${JSON.stringify(line)}\n`;
}

/** The last line may have been cut short by a kill; what it told was never answered. */
function parseLine(text: string): Line | undefined {
  try {
    return text ? (JSON.parse(text) as Line) : undefined;
  } catch {
    return undefined;
  }
}
