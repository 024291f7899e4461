import { FINDINGS_FIELDS } from './findings-fields.js';
import type { AnyFields, AnyShape } from './shape.js';

/** A JSON Schema as plain data. */
export type JsonSchema = Readonly<Record<string, unknown>>;

/**
 * The JSON Schema (draft 7) of results.json, made from the same descriptions as the tables.
 *
 * @example
 * resultsSchema().title // => 'Results of bedorder'
 */
export function resultsSchema(): JsonSchema {
  return {
    $schema: 'http://json-schema.org/draft-07/schema#',
    title: 'Results of bedorder',
    description: 'Everything that was found in one survey. The order of deposits is relative, and is no age.',
    ...objectSchema(FINDINGS_FIELDS),
  };
}

function objectSchema(fields: AnyFields): JsonSchema {
  const names = Object.keys(fields);
  return {
    type: 'object',
    additionalProperties: false,
    required: names.filter((name) => !fields[name].optional),
    properties: Object.fromEntries(names.map((name) => [name, schemaOf(fields[name])])),
  };
}

function schemaOf(shape: AnyShape): JsonSchema {
  const body = { description: describe(shape), ...bodyOf(shape) };
  return shape.nullable ? { anyOf: [body, { type: 'null' }] } : body;
}

function bodyOf(shape: AnyShape): JsonSchema {
  switch (shape.type) {
    case 'text':
      return { type: 'string' };
    case 'choice':
      return { type: 'string', enum: Object.keys(shape.values) };
    case 'list':
      return { type: 'array', items: schemaOf(shape.items) };
    case 'map':
      return { type: 'object', additionalProperties: schemaOf(shape.items) };
    case 'object':
      return objectSchema(shape.fields);
    case 'either':
      return { anyOf: shape.of.map(schemaOf) };
    default:
      return {
        type: shape.type,
        ...(shape.minimum === undefined ? {} : { minimum: shape.minimum }),
        ...(shape.maximum === undefined ? {} : { maximum: shape.maximum }),
      };
  }
}

function describe(shape: AnyShape): string {
  return shape.unit === undefined ? shape.description : `${shape.description} (${shape.unit})`;
}
