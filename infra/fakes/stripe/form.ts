/** Parameters as the SDK sends them: every leaf is text. */
export type Params = { [name: string]: Param };
export type Param = string | Params | Param[];

function keysOf(name: string): string[] {
  const first = name.indexOf('[');
  if (first < 0) return [name];
  const inner = [...name.slice(first).matchAll(/\[([^\]]*)\]/g)].map((found) => found[1] ?? '');
  return [name.slice(0, first), ...inner];
}

function put(into: Params, keys: string[], value: string): void {
  const [key = '', ...rest] = keys;
  const at = key === '' ? String(Object.keys(into).length) : key;
  if (rest.length === 0) {
    into[at] = value;
    return;
  }
  const inner = Object.hasOwn(into, at) ? into[at] : undefined;
  const next: Params = typeof inner === 'object' && !Array.isArray(inner) ? inner : newParams();
  into[at] = next;
  put(next, rest, value);
}

function newParams(): Params {
  return Object.create(null) as Params;
}

/** Objects whose keys count 0, 1, 2 ... are lists: `items[0][price]`. */
function withLists(param: Param): Param {
  if (typeof param !== 'object' || Array.isArray(param)) return param;
  const entries = Object.entries(param).map(([key, value]): [string, Param] => [
    key,
    withLists(value),
  ]);
  const isList = entries.length > 0 && entries.every(([key], at) => key === String(at));
  return isList ? entries.map(([, value]) => value) : Object.fromEntries(entries);
}

/** `a[b][0]=c` as `{ a: { b: ['c'] } }`. */
export function parseForm(text: string): Params {
  const flat = newParams();
  for (const [name, value] of new URLSearchParams(text)) put(flat, keysOf(name), value);
  return Object.fromEntries(Object.entries(flat).map(([key, value]) => [key, withLists(value)]));
}
