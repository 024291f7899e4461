/**
 * What the Data Package standard, version 2.0, asks of a package of tables (facts seen in the published profiles
 * datapackage.json, dataresource.json, tabledialect.json and tableschema.json of datapackage.org; written anew here,
 * and stricter where this program promises more): names are text, each resource has a name and either data or a path
 * that is relative and stays inside, hashes name their algorithm, fields have a known type, and only the constraints
 * and properties that belong to it.
 */
const fieldTypes = ['string', 'number', 'integer', 'boolean', 'list'] as const;

const constraints = (value: object, more: Record<string, object> = {}) => ({
  type: 'object',
  additionalProperties: false,
  minProperties: 1,
  properties: {
    required: { type: 'boolean' },
    unique: { type: 'boolean' },
    enum: { type: 'array', minItems: 1, uniqueItems: true, items: value },
    ...more,
  },
});

const about = { name: { type: 'string' }, title: { type: 'string' }, description: { type: 'string', minLength: 4 } };

const field = (type: (typeof fieldTypes)[number], properties: Record<string, object>) => ({
  type: 'object',
  required: ['name', 'type', 'description'],
  additionalProperties: false,
  properties: { ...about, type: { const: type }, ...properties },
});

const unit = { type: 'string', minLength: 1 };
const number = { type: 'number' };
const integer = { type: 'integer' };

const fields = [
  field('string', {
    constraints: constraints(
      { type: 'string' },
      { minLength: integer, maxLength: integer, pattern: { type: 'string' } },
    ),
    categories: {
      type: 'array',
      minItems: 1,
      items: {
        type: 'object',
        required: ['value'],
        properties: { value: { type: 'string' }, label: { type: 'string' } },
      },
    },
  }),
  field('number', { unit, constraints: constraints(number, { minimum: number, maximum: number }) }),
  field('integer', { unit, constraints: constraints(integer, { minimum: integer, maximum: integer }) }),
  field('boolean', {
    trueValues: { type: 'array', minItems: 1, items: { type: 'string' } },
    falseValues: { type: 'array', minItems: 1, items: { type: 'string' } },
    constraints: constraints({ type: 'boolean' }),
  }),
  field('list', {
    delimiter: { type: 'string', minLength: 1 },
    itemType: { enum: ['string', 'integer', 'boolean', 'number', 'datetime', 'date', 'time'] },
  }),
];

const resource = {
  type: 'object',
  required: ['name', 'path'],
  properties: {
    name: { type: 'string', pattern: '^[-a-z0-9._/]+$' },
    // relative, and not out of the folder
    path: { type: 'string', pattern: '^(?=[^./~])(?!file:)((?!/\\.\\./)(?!\\\\)(?!:\\/\\/).)*$' },
    type: { const: 'table' },
    title: { type: 'string' },
    format: { type: 'string' },
    mediatype: { type: 'string', pattern: '^(.+)/(.+)$' },
    encoding: { const: 'utf-8' },
    bytes: { type: 'integer', minimum: 0 },
    hash: { type: 'string', pattern: '^sha256:[a-f0-9]{64}$' },
    dialect: {
      type: 'object',
      additionalProperties: false,
      properties: {
        delimiter: { type: 'string' },
        lineTerminator: { type: 'string' },
        quoteChar: { type: 'string', maxLength: 1 },
        doubleQuote: { type: 'boolean' },
        header: { type: 'boolean' },
      },
    },
    schema: {
      type: 'object',
      required: ['fields'],
      additionalProperties: false,
      properties: {
        fields: { type: 'array', minItems: 1, items: { oneOf: fields } },
        missingValues: { type: 'array', items: { type: 'string' } },
      },
    },
  },
  // a table has its schema, and nothing else has one
  if: { required: ['type'] },
  // biome-ignore lint/suspicious/noThenProperty: a keyword of JSON Schema
  then: { required: ['schema', 'dialect'] },
  else: { not: { required: ['schema'] } },
};

/** JSON Schema of a datapackage.json as this program should write it. */
export const DATA_PACKAGE_RULES = {
  type: 'object',
  required: ['$schema', 'name', 'resources'],
  properties: {
    $schema: { const: 'https://datapackage.org/profiles/2.0/datapackage.json' },
    name: { type: 'string', pattern: '^[-a-z0-9._/]+$' },
    title: { type: 'string' },
    description: { type: 'string' },
    version: { type: 'string' },
    resources: { type: 'array', minItems: 1, items: resource },
  },
};
