import fc from 'fast-check';
import { type Random } from './random';

/** As much of JSON Schema as the API document uses. */
export interface JsonSchema {
  type?: string | string[];
  enum?: unknown[];
  const?: unknown;
  anyOf?: JsonSchema[];
  oneOf?: JsonSchema[];
  allOf?: JsonSchema[];
  properties?: Record<string, JsonSchema>;
  required?: string[];
  items?: JsonSchema;
  prefixItems?: JsonSchema[];
  additionalProperties?: JsonSchema | boolean;
  format?: string;
  pattern?: string;
  minLength?: number;
  maxLength?: number;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  minItems?: number;
  maxItems?: number;
  default?: unknown;
}

interface SampleOptions {
  random: Random;
  /** What stands where an id is asked for; gets the name of its field. */
  id: (name: string) => string;
  /** Ends each free text, so that two otherwise equal bodies do not collide; three letters. */
  mark?: string;
  /** How likely a field that may be left out is there. */
  optional?: number;
}

/** A value the schema allows. */
export function sample(schema: JsonSchema, options: SampleOptions, name = ''): unknown {
  const { random } = options;
  if ('const' in schema) return schema.const;
  if (schema.enum) return random.pick(schema.enum);
  const choices = schema.anyOf ?? schema.oneOf;
  if (choices) return sample(random.pick(choices), options, name);
  const type = Array.isArray(schema.type) ? random.pick(schema.type) : schema.type;
  switch (type) {
    case 'object':
      return sampleObject(schema, options);
    case 'array': {
      const length = Math.max(
        schema.minItems ?? 0,
        Math.min(schema.maxItems ?? 2, random.below(3)),
      );
      return Array.from({ length }, () => sample(schema.items ?? {}, options, name));
    }
    case 'integer':
    case 'number':
      return sampleNumber(schema, random);
    case 'boolean':
      return random.chance(0.5);
    case 'null':
      return null;
    case 'string':
      return sampleText(schema, options, name);
    default:
      return 'anything';
  }
}

function sampleObject(schema: JsonSchema, options: SampleOptions): Record<string, unknown> {
  const entries = Object.entries(schema.properties ?? {}).flatMap(([name, property]) => {
    const there =
      (schema.required ?? []).includes(name) || options.random.chance(options.optional ?? 0.7);
    return there ? [[name, sample(property, options, name)] as const] : [];
  });
  return Object.fromEntries(entries);
}

function sampleNumber(schema: JsonSchema, random: Random): number {
  const low = schema.minimum ?? (schema.exclusiveMinimum ?? -1) + 1;
  const high = Math.min(schema.maximum ?? low + 1000, low + 1000);
  return low + random.below(high - low + 1);
}

const matching = new Map<string, string[]>();

/** Some texts a pattern allows, the same in each run; reading a pattern costs more than a request. */
function textsMatching(pattern: string): string[] {
  const known =
    matching.get(pattern) ??
    fc.sample(fc.stringMatching(new RegExp(pattern)), { numRuns: 100, seed: pattern.length });
  matching.set(pattern, known);
  return known;
}

function sampleText(schema: JsonSchema, options: SampleOptions, name: string): string {
  const { random } = options;
  switch (schema.format) {
    case 'uuid':
      return options.id(name);
    case 'email':
      return `person${random.below(1e6)}@people.example`;
    case 'date':
      return `20${20 + random.below(15)}-0${1 + random.below(9)}-1${random.below(10)}`;
    case 'date-time':
      return `202${random.below(7)}-0${1 + random.below(9)}-11T10:00:00Z`;
    case 'uri':
      return 'https://example.com/';
  }
  if (name === 'zone') return random.pick(['Europe/Vienna', 'America/Chicago']);
  if (schema.pattern) {
    return random.pick(textsMatching(schema.pattern));
  }
  const length = Math.max(schema.minLength ?? 1, Math.min(schema.maxLength ?? 12, 12));
  const text = Array.from({ length }, () => random.pick([...'abcdefghij mnoprst'])).join('');
  const marked = options.mark && length > 6 ? text.slice(0, -3) + options.mark : text;
  return marked.replace(/^ | $/g, 'x');
}
