/**
 * The one JSON text of a value: keys sorted, no white space. Two equal snapshots give the same
 * text however they were stored, so that its hash proves a statement unchanged.
 *
 * @param value plain objects, arrays, strings, finite numbers, booleans and null; properties that
 *   are undefined are left out
 * @throws TypeError for anything else, as it would not survive being stored
 * Source: RFC 8785, JSON Canonicalization Scheme.
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'string') return stringText(value);
  if (typeof value === 'number') return numberText(value);
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (isPlainObject(value)) return objectText(value);
  throw new TypeError(`Not a JSON value: ${typeof value}`);
}

function objectText(value: Record<string, unknown>): string {
  const members = Object.keys(value)
    .filter((key) => value[key] !== undefined)
    // The default order of sort() is by UTF-16 code units, as the standard wants it.
    .sort()
    .map((key) => `${stringText(key)}:${canonicalJson(value[key])}`);
  return `{${members.join(',')}}`;
}

/** JSON.stringify writes strings and numbers as RFC 8785 prescribes: it was made after it. */
function stringText(value: string): string {
  if (/\p{Surrogate}/u.test(value)) throw new TypeError('A string holds half a character');
  return JSON.stringify(value);
}

function numberText(value: number): string {
  if (!Number.isFinite(value)) throw new TypeError(`Not a JSON number: ${value}`);
  return JSON.stringify(value);
}

function isPlainObject(value: unknown): value is Record<string, unknown> {
  if (typeof value !== 'object' || value === null) return false;
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === Object.prototype || prototype === null;
}
