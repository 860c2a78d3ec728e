import { type Random } from './random';

/** Values that have broken servers before: wrong types, edges, and text that cannot be stored. */
const nasty: unknown[] = [
  null,
  true,
  false,
  0,
  -1,
  1,
  1.5,
  -0.1,
  2 ** 53,
  -(2 ** 53),
  9007199254740993,
  1e308,
  1e-308,
  '',
  ' ',
  '\u0000',
  'a\u0000b',
  '\ud800',
  '\udfff x',
  '\u202e',
  '\ufeff',
  'é'.repeat(300),
  'x'.repeat(20_000),
  '2031-02-30',
  '2031-13-01',
  '0000-00-00',
  '9999-12-31T23:59:60Z',
  '00000000-0000-0000-0000-000000000000',
  'ffffffff-ffff-ffff-ffff-ffffffffffff',
  'not-an-id',
  "'; drop table shops; --",
  '=1+1',
  '%',
  '_',
  '\\',
  '$1',
  '$shopId',
  '{{x}}',
  '../../etc/passwd',
  '1e5',
  '٣',
  'NaN',
  'Infinity',
  [],
  [[]],
  [null],
  {},
  { a: { b: { c: {} } } },
  { $gt: 1 },
  JSON.parse('{"__proto__": {"x": 1}}'),
  { constructor: 1 },
  { toString: 1 },
  { length: -1 },
];

/** A copy of `value` with one place in it replaced, removed, or added to. */
export function spoil(value: unknown, random: Random): unknown {
  if (random.chance(0.08)) return random.pick(nasty);
  if (Array.isArray(value)) {
    if (value.length === 0) return [random.pick(nasty)];
    const index = random.below(value.length);
    if (random.chance(0.1)) return Array.from({ length: 300 }, () => value[index]);
    return value.map((item, i) => (i === index ? spoil(item, random) : item));
  }
  if (value !== null && typeof value === 'object') return spoilObject(value, random);
  return random.pick(nasty);
}

function spoilObject(value: object, random: Random): unknown {
  const entries = Object.entries(value);
  if (entries.length === 0 || random.chance(0.1)) {
    return { ...value, [random.pick(['extra', '', 'id', 'shopId', 'a/b~c', 'constructor'])]: 1 };
  }
  const index = random.below(entries.length);
  if (random.chance(0.15)) return Object.fromEntries(entries.filter((_, i) => i !== index));
  return Object.fromEntries(
    entries.map(([key, item], i) => [key, i === index ? spoil(item, random) : item]),
  );
}

/** Bodies that are not the JSON they claim to be. */
export function brokenJson(random: Random): string {
  return random.pick([
    '',
    '{',
    '[',
    '"',
    '{"a":}',
    '{"a":1,}',
    'nul',
    '\u0000',
    '{"a":"\\ud800"}',
    '[1,2',
    '{]',
    '1 2',
    `${'['.repeat(50_000)}${']'.repeat(50_000)}`,
    `${'{"a":'.repeat(5_000)}1${'}'.repeat(5_000)}`,
    `{"a":"${'x'.repeat(600_000)}"}`,
    '{"a":1e99999}',
    '\ufeff{}',
    'a=1&b=2',
  ]);
}
