import { z } from 'zod';
import * as enums from './enums';
import { type Operation, storesAnswer } from './operation';
import { operations } from './operations';

const banner = '// Written by `npm run contracts` from the contracts: do not edit by hand.\n';

interface JsonSchema {
  type?: string | string[];
  properties?: Record<string, JsonSchema>;
  required?: string[];
  minLength?: number;
  maxLength?: number;
  minimum?: number;
  maximum?: number;
  pattern?: string;
  format?: string;
  anyOf?: JsonSchema[];
}

/** The text of each generated file by its name. */
export function webTables(): Record<string, string> {
  const all = Object.values(operations) as Operation[];
  return {
    'routes.ts': routesTable(all),
    'form-rules.ts': rulesTable(all),
    'values.ts': valueLists(),
  };
}

/** The values of each enumeration, under its name in the plural. */
function valueLists(): string {
  const lists = Object.entries(enums).map(
    ([name, { options }]) =>
      `export const ${plural(name)} = ['${options.join("', '")}'] as const;\n`,
  );
  return `${banner}\n${lists.sort().join('')}`;
}

function plural(name: string): string {
  return name.endsWith('y') ? `${name.slice(0, -1)}ies` : `${name}s`;
}

function routesTable(all: Operation[]): string {
  const rows = all.map(
    (o) => `  '${o.id}': ['${o.method}', '${o.path}'${storesAnswer(o) ? ', true' : ''}],`,
  );
  return `${banner}
/** Method, path, and whether an Idempotency-Key goes with it. */
export type Route = readonly [method: string, path: string, keyed?: true];

export const routes = {
${rows.join('\n')}
} as const satisfies Record<string, Route>;
`;
}

function rulesTable(all: Operation[]): string {
  const rows = all.flatMap((o) => {
    const rules = o.body ? fieldRules(o.body) : {};
    return Object.keys(rules).length ? [`  '${o.id}': ${JSON.stringify(rules)},`] : [];
  });
  return `${banner}
export interface FieldRule {
  required?: true;
  minLength?: number;
  maxLength?: number;
  min?: number;
  max?: number;
  pattern?: string;
  email?: true;
}

export const formRules: Record<string, Record<string, FieldRule>> = {
${rows.join('\n')}
};
`;
}

function fieldRules(body: z.ZodType): Record<string, object> {
  const schema = z.toJSONSchema(body, { io: 'input', unrepresentable: 'any' }) as JsonSchema;
  return Object.fromEntries(
    Object.entries(schema.properties ?? {}).map(([name, field]) => [
      name,
      rule(field, (schema.required ?? []).includes(name)),
    ]),
  );
}

function rule(field: JsonSchema, required: boolean): object {
  const value = field.anyOf?.find((option) => option.type !== 'null') ?? field;
  const patterned = value.pattern !== undefined && value.format === undefined;
  return {
    // A text that may be empty is not a field that must be filled in.
    ...(required && (value.type !== 'string' || (value.minLength ?? 1) > 0)
      ? { required: true }
      : {}),
    ...pick(value, 'minLength', 'minLength'),
    ...pick(value, 'maxLength', 'maxLength'),
    ...pick(value, 'minimum', 'min'),
    ...pick(value, 'maximum', 'max'),
    ...(patterned ? { pattern: value.pattern } : {}),
    ...(value.format === 'email' ? { email: true } : {}),
  };
}

function pick(value: JsonSchema, from: keyof JsonSchema, to: string): object {
  return value[from] === undefined ? {} : { [to]: value[from] };
}
