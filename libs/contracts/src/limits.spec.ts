import { z } from 'zod';
import { type Operation } from './operation';
import { operations } from './operations';

interface Schema {
  type?: string;
  format?: string;
  pattern?: string;
  enum?: unknown[];
  const?: unknown;
  maxLength?: number;
  maxItems?: number;
  maximum?: number;
  maxProperties?: number;
  properties?: Record<string, Schema>;
  additionalProperties?: Schema | boolean;
  items?: Schema;
  anyOf?: Schema[];
  oneOf?: Schema[];
  allOf?: Schema[];
}

/** Where a caller could send as much as they like. */
function unlimited(schema: Schema, place: string): string[] {
  const { properties = {}, additionalProperties, items, anyOf, oneOf, allOf } = schema;
  const wild = typeof additionalProperties === 'object' ? additionalProperties : undefined;
  return [
    ...(hasLimit(schema, wild) ? [] : [place]),
    ...Object.entries(properties).flatMap(([name, each]) => unlimited(each, `${place}/${name}`)),
    ...(wild ? unlimited(wild, `${place}/*`) : []),
    ...(items ? unlimited(items, `${place}/[]`) : []),
    ...[anyOf, oneOf, allOf].flatMap((some) => some ?? []).flatMap((s) => unlimited(s, place)),
  ];
}

function hasLimit(schema: Schema, wild: Schema | undefined): boolean {
  const { type, maxLength, maxItems, maximum, maxProperties } = schema;
  const chosen = schema.enum !== undefined || schema.const !== undefined;
  const shaped = schema.format !== undefined || schema.pattern !== undefined;
  if (type === 'string') return maxLength !== undefined || chosen || shaped;
  if (type === 'array') return maxItems !== undefined;
  if (type === 'integer' || type === 'number') {
    return chosen || (maximum !== undefined && maximum < Number.MAX_SAFE_INTEGER);
  }
  return wild === undefined || maxProperties !== undefined;
}

describe('requests', () => {
  it('have a limit to everything in them', () => {
    const found = (Object.values(operations) as Operation[]).flatMap((operation) =>
      (['params', 'query', 'body'] as const).flatMap((part) => {
        const type = operation[part];
        if (!type) return [];
        const schema = z.toJSONSchema(type, { io: 'input', unrepresentable: 'any' }) as Schema;
        return unlimited(schema, `${operation.id} ${part}`);
      }),
    );
    expect(found).toEqual([]);
  });
});
