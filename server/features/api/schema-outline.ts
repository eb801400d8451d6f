interface Schema {
  $ref?: string;
  type?: string | string[];
  const?: unknown;
  enum?: unknown[];
  anyOf?: Schema[];
  oneOf?: Schema[];
  allOf?: Schema[];
  properties?: Record<string, Schema>;
  required?: string[];
  additionalProperties?: Schema | boolean;
  items?: Schema;
  prefixItems?: Schema[];
  format?: string;
  pattern?: string;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  exclusiveMaximum?: number;
  maxLength?: number;
  maxItems?: number;
  default?: unknown;
}

/** A JSON Schema in a few lines that people can read: `{ name: text ≤ 100 characters, years?: whole number 1 to 500 }`. */
export const schemaOutline = (schema: unknown): string => outlineOf(schema as Schema, '');

function outlineOf(schema: Schema, indent: string): string {
  if (schema.$ref) return `→ ${schema.$ref.replace('#/components/schemas/', '')}`;
  if (schema.const !== undefined) return JSON.stringify(schema.const);
  if (schema.enum) return schema.enum.map((value) => JSON.stringify(value)).join(' | ');
  if (Array.isArray(schema.type))
    return schema.type.map((type) => outlineOf({ ...schema, type }, indent)).join(' | ');
  const choices = schema.anyOf ?? schema.oneOf;
  if (choices) return choices.map((choice) => outlineOf(choice, indent)).join(' | ');
  if (schema.allOf) return schema.allOf.map((part) => outlineOf(part, indent)).join(' with ');
  if (schema.type === 'object') return objectOf(schema, indent);
  if (schema.prefixItems) return `[${schema.prefixItems.map((item) => outlineOf(item, indent)).join(', ')}]`;
  if (schema.type === 'array')
    return `list of ${outlineOf(schema.items ?? {}, indent)}${atMost(schema.maxItems)}`;
  if (schema.type === 'null') return 'null';
  if (schema.type === 'boolean') return 'true | false';
  if (schema.type === 'number' || schema.type === 'integer') return numberOf(schema);
  if (schema.type === 'string') return `text${format(schema)}${atMost(schema.maxLength, ' characters')}`;
  return 'anything';
}

function objectOf(schema: Schema, indent: string): string {
  const inner = `${indent}  `;
  const fields = Object.entries(schema.properties ?? {}).map(([name, field]) => {
    const mark = schema.required?.includes(name) ? '' : '?';
    const unless = field.default === undefined ? '' : `, ${JSON.stringify(field.default)} unless said`;
    return `${inner}${name}${mark}: ${outlineOf(field, inner)}${unless}`;
  });
  const others = schema.additionalProperties;
  if (typeof others === 'object' && Object.keys(others).length > 0)
    fields.push(`${inner}by name: ${outlineOf(others, inner)}`);
  return fields.length === 0 ? '{}' : `{\n${fields.join('\n')}\n${indent}}`;
}

function numberOf({ type, minimum, maximum, exclusiveMinimum, exclusiveMaximum }: Schema): string {
  const safe = (value: number | undefined) => (Math.abs(value ?? Infinity) < 2 ** 53 - 1 ? value : undefined);
  const low = safe(minimum) ?? (exclusiveMinimum === undefined ? undefined : `above ${exclusiveMinimum}`);
  const high = safe(maximum) ?? (exclusiveMaximum === undefined ? undefined : `below ${exclusiveMaximum}`);
  const range =
    low !== undefined && high !== undefined
      ? ` ${low} to ${high}`
      : low !== undefined
        ? ` from ${low}`
        : high !== undefined
          ? ` up to ${high}`
          : '';
  return `${type === 'integer' ? 'whole number' : 'number'}${range}`;
}

const format = ({ format: named, pattern }: Schema) =>
  named ? ` (${named})` : pattern ? ` (like ${pattern})` : '';
const atMost = (count: number | undefined, unit = '') => (count === undefined ? '' : ` ≤ ${count}${unit}`);
